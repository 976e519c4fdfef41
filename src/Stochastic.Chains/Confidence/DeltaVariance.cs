using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Confidence;

/// <summary>
/// The variance of an answer whose derivative in the direction dP is Σ_i w_i Σ_k dp_ik v_k. A row estimated from n_i moves has the covariance
/// (diag(p) − ppᵀ)/n_i, so the row adds w_i² times the variance of v over the row's next state, over n_i.
/// </summary>
internal sealed class DeltaVariance<TState>
    where TState : notnull
{
    private readonly TransitionEstimate<TState> _estimate;

    private DeltaVariance(TransitionEstimate<TState> estimate) => _estimate = estimate;

    internal Chain<TState> Chain => _estimate.Chain;

    internal static DeltaVariance<TState> Of(TransitionCounts<TState> counts, EstimateOptions<TState> options)
    {
        ArgumentNullException.ThrowIfNull(options);
        return new DeltaVariance<TState>(counts.Estimate(options with { Prior = null }));
    }

    internal DeltaConfidence ToConfidence(double answer, Func<TState, double> weight, Func<TState, double> figure)
    {
        var sum = default(CompensatedSum);
        for (var row = 0; row < Chain.StateCount; row++)
        {
            var total = _estimate.TotalFrom(row);
            var factor = weight(Chain.States[row]);
            if (total > 0 && factor != 0)
            {
                sum.Add(factor * factor * Variance(row, figure) / total);
            }
        }

        return new DeltaConfidence(answer, sum.Value, _estimate.Options.Level);
    }

    private double Variance(int row, Func<TState, double> figure)
    {
        var mean = default(CompensatedSum);
        foreach (var (column, probability) in Chain.Matrix.Row(row))
        {
            mean.Add(probability * figure(Chain.States[column]));
        }

        var squares = default(CompensatedSum);
        foreach (var (column, probability) in Chain.Matrix.Row(row))
        {
            var deviation = figure(Chain.States[column]) - mean.Value;
            squares.Add(probability * deviation * deviation);
        }

        return squares.Value;
    }
}
