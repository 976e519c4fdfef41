using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Passage;

/// <summary>What was asked of a chain about its ends, kept with the answer so that more can be asked.</summary>
internal sealed class AbsorptionQuestion<TState>
    where TState : notnull
{
    private readonly Chain<TState> _chain;
    private readonly int[] _endOf;
    private readonly int[] _transient;

    internal AbsorptionQuestion(Chain<TState> chain, int[] endOf, SolveOptions options)
    {
        _chain = chain;
        _endOf = endOf;
        _transient = [.. Enumerable.Range(0, endOf.Length).Where(state => endOf[state] < 0)];
        Options = options with { CancellationToken = CancellationToken.None, Progress = null };
    }

    /// <summary>How the first question was to be computed, without its token and its listener.</summary>
    internal SolveOptions Options { get; }

    internal FundamentalMatrix<TState> FundamentalMatrix(SolveOptions options)
    {
        var visits = new VisitTable(0, [], ErrorBasis.Structure, 0);
        if (_transient.Length > 0)
        {
            using var system = Reduce(options);
            visits = system.Inverse();
        }

        return FundamentalMatrix<TState>.Of(_chain, _transient, visits, options);
    }

    internal ConditionalTimes<TState> StepsIfInto(int end, double[] probabilities, Certificate evidence)
    {
        var means = Array.ConvertAll(_endOf, own => own == end ? 0 : double.PositiveInfinity);
        var totals = new SolveEvidence(Options);
        int[] members = [.. _transient.Where(state => probabilities[state] > 0)];
        if (members.Length > 0)
        {
            ConditionalMeans<TState>.Fill(_chain, members, Array.ConvertAll(_endOf, own => own == end ? 0 : 1), probabilities, means, evidence, totals, Options);
        }

        return new ConditionalTimes<TState>(_chain.States, means, totals.ToCertificate());
    }

    internal Chain<TState> Conditional(int end, double[] probabilities)
    {
        int[] kept = [.. Enumerable.Range(0, probabilities.Length).Where(state => _endOf[state] == end || probabilities[state] > 0)];
        var newPosition = new int[probabilities.Length];
        newPosition.AsSpan().Fill(-1);
        for (var position = 0; position < kept.Length; position++)
        {
            newPosition[kept[position]] = position;
        }

        var moves = new TripletList();
        foreach (var from in kept)
        {
            foreach (var (to, probability) in _chain.Matrix.Row(from))
            {
                if (newPosition[to] >= 0)
                {
                    moves.Add(newPosition[from], newPosition[to], Weighted(from, to, probability, probabilities));
                }
            }
        }

        return new Chain<TState>(
            StateSpace.Of(kept.Select(state => _chain.States[state]), _chain.States.Comparer),
            TransitionMatrix.FromCompressedRows(moves.ToCompressedRows(kept.Length)),
            [],
            _chain.UniformizationRate);
    }

    private double Weighted(int from, int to, double probability, double[] ends)
    {
        var product = probability * ends[to];
        var weighted = from == to ? probability : double.IsNormal(product) ? product / ends[from] : probability * (ends[to] / ends[from]);
        return double.IsNormal(weighted)
            ? Math.Min(weighted, 1)
            : throw new NumericalRangeException(Messages.ConditionalTooSmall(_chain.States[from], _chain.States[to]), Text.Label(_chain.States[from]));
    }

    private ExitSystem<TState> Reduce(SolveOptions options) =>
        new(_chain, _transient, exits: 1, Array.ConvertAll(_endOf, end => end < 0 ? -1 : 0), options);
}
