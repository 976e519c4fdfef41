using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Passage;

/// <summary>Variances of all first passage times, one target after the other, and of the times of coming back.</summary>
/// <remarks>
/// With h and V the mean and variance of the time to a state from each other one, and m the mean time of coming back to it, the variance of coming back is the
/// mean over the first step of V + (1 + h − m)²; in continuous time the time of leaving adds its own square 1 / q², and the squares are (h − m + 1 / q)².
/// </remarks>
internal sealed class FirstPassageVariance<TState>
    where TState : notnull
{
    private const double SecondOrder = 1.01;
    private const double Rounding = 8 * Refinement.UnitRoundoff;

    private readonly Chain<TState> _chain;
    private readonly double[] _means;
    private readonly double _meansError;
    private readonly SolveOptions _options;
    private readonly ScaledDoubleDouble[] _variances;
    private readonly double[] _deviations;
    private double _relative;
    private double _absolute;

    internal FirstPassageVariance(Chain<TState> chain, double[] means, Certificate evidence, SolveOptions options)
    {
        _chain = chain;
        _means = means;
        _meansError = evidence.IsProof ? evidence.RelativeErrorBound : double.PositiveInfinity;
        _options = options;
        _variances = new ScaledDoubleDouble[means.Length];
        _deviations = new double[means.Length];
    }

    internal FirstPassageVariances<TState> Solve()
    {
        var count = _chain.StateCount;
        var report = _options.Report("targets");
        var basis = ErrorBasis.Structure;
        for (var target = 0; target < count; target++)
        {
            var moments = HittingSolve<TState>.Of(_chain, [target], _options).Moments(_options);
            for (var from = 0; from < count; from++)
            {
                Set((from * count) + target, moments.WideVariance(from), moments.Values[from]);
            }

            SetReturn(target, moments);
            _relative = Math.Max(_relative, moments.Certificate.RelativeErrorBound);
            _absolute = Math.Max(_absolute, moments.Certificate.AbsoluteErrorBound);
            basis = moments.Certificate.Basis == ErrorBasis.Structure ? basis : moments.Certificate.Basis;
            report?.Invoke((target + 1.0) / count);
        }

        var isProof = _options.CertificateLevel == CertificateLevel.Proof && double.IsFinite(_absolute);
        return new FirstPassageVariances<TState>(_chain.States, _variances, _deviations, new Certificate
        {
            Method = "state reduction with exit rates",
            Reason = "One target after the other; for each start the better of two ways.",
            RelativeErrorBound = isProof ? _relative : double.PositiveInfinity,
            AbsoluteErrorBound = isProof ? _absolute : double.PositiveInfinity,
            Basis = isProof ? basis : ErrorBasis.None,
            IsProof = isProof,
        });
    }

    private void Set(int position, ScaledDoubleDouble variance, double deviation) => (_variances[position], _deviations[position]) = (variance, deviation);

    private void SetReturn(int state, PassageMoments<TState> moments)
    {
        var position = (state * _chain.StateCount) + state;
        var mean = _means[position];
        if (!double.IsFinite(mean))
        {
            _deviations[position] = double.PositiveInfinity;
            return;
        }

        var (variance, error) = _chain.UniformizationRate is { } rate ? Timed(state, mean, rate, moments) : Stepwise(state, mean, moments);
        Set(position, variance, variance.SquareRoot());
        if (variance.IsZero && error.IsZero)
        {
            return;
        }

        var share = variance.IsZero ? double.PositiveInfinity : (error / variance).ToDouble() + moments.Certificate.RelativeErrorBound + Rounding;
        _relative = Math.Max(_relative, share * SecondOrder);
        _absolute = Math.Max(_absolute, share < 1 ? share * _deviations[position] * SecondOrder : error.SquareRoot() * SecondOrder);
    }

    private (ScaledDoubleDouble Variance, ScaledDoubleDouble Error) Stepwise(int state, double mean, PassageMoments<TState> moments)
    {
        var steps = StepMatrix.Of(_chain);
        var total = (Variance: default(ScaledDoubleDouble), Error: default(ScaledDoubleDouble));
        foreach (var (to, given) in _chain.Matrix.Row(state))
        {
            var probability = to == state ? steps.Stay(state) : given;
            var time = to == state ? 0 : moments.MeanAt(to);
            Add(ref total, probability, moments.WideVariance(to), 1 + time - mean, 1 + time + mean);
        }

        return total;
    }

    private (ScaledDoubleDouble Variance, ScaledDoubleDouble Error) Timed(int state, double mean, double rate, PassageMoments<TState> moments)
    {
        var outflow = default(CompensatedSum);
        foreach (var (to, given) in _chain.Matrix.Row(state))
        {
            outflow.Add(to == state ? 0 : given);
        }

        var staying = 1 / (outflow.Value * rate);
        var total = (Variance: (ScaledDoubleDouble)staying * staying, Error: default(ScaledDoubleDouble));
        foreach (var (to, given) in _chain.Matrix.Row(state))
        {
            if (to != state)
            {
                Add(ref total, given / outflow.Value, moments.WideVariance(to), moments.MeanAt(to) - mean + staying, moments.MeanAt(to) + mean + staying);
            }
        }

        return total;
    }

    private void Add(
        ref (ScaledDoubleDouble Variance, ScaledDoubleDouble Error) total, double probability, ScaledDoubleDouble variance, double deviation, double size)
    {
        ScaledDoubleDouble distance = Math.Abs(deviation);
        ScaledDoubleDouble uncertainty = double.IsFinite(_meansError) ? ((_meansError * SecondOrder) + Rounding) * size : 0;
        total.Variance += probability * (variance + (distance * distance));
        total.Error += probability * (uncertainty * (distance + distance + uncertainty));
    }
}
