using Stochastic.Chains.Kernels;
using Stochastic.Chains.Passage;

namespace Stochastic.Chains.LongRun;

/// <summary>
/// What the long run is made of: the probability of ending in each recurrent class, from each state, and the share of time in each state of a
/// class once it is entered. The product of the two is the long-run share (Kemeny and Snell 1960).
/// </summary>
internal sealed class LongRunParts<TState>
    where TState : notnull
{
    private readonly double[]? _endings;
    private readonly double _endingBound;
    private readonly double _endingResidual;
    private readonly ErrorBasis _endingBasis = ErrorBasis.Structure;

    internal LongRunParts(Chain<TState> chain, SolveOptions options)
    {
        Chain = chain;
        Options = options;
        Classes = chain.Structure().RecurrentClasses;
        Shares = chain.StationaryPerClass(options);
        ClassOf = new int[chain.StateCount];
        ClassOf.AsSpan().Fill(-1);
        for (var end = 0; end < Classes.Count; end++)
        {
            foreach (var member in Classes[end].Members)
            {
                ClassOf[member] = end;
            }
        }

        var transient = chain.Structure().TransientPositions;
        if (Classes.Count > 1 && transient.Length > 0)
        {
            options.RequireMemory(chain.StateCount, sizeof(double) * (long)chain.StateCount * Classes.Count);
            _endings = new double[chain.StateCount * Classes.Count];
            foreach (var member in Enumerable.Range(0, chain.StateCount).Where(state => ClassOf[state] >= 0))
            {
                _endings[(member * Classes.Count) + ClassOf[member]] = 1;
            }

            using var system = new ExitSystem<TState>(chain, transient, Classes.Count, ClassOf, options);
            for (var end = 0; end < Classes.Count; end++)
            {
                var solution = system.ExitProbabilities(end);
                Store(solution.Values, transient, end);
                (_endingBound, _endingBasis) = solution.RelativeErrorBound > _endingBound ? (solution.RelativeErrorBound, solution.Basis) : (_endingBound, _endingBasis);
                _endingResidual = Math.Max(_endingResidual, options.CertificateLevel >= CertificateLevel.Residual ? system.Residual(0, Column(end)) : double.PositiveInfinity);
            }
        }
    }

    internal Chain<TState> Chain { get; }

    internal SolveOptions Options { get; }

    internal IReadOnlyList<CommunicatingClass<TState>> Classes { get; }

    internal IReadOnlyList<StationaryDistribution<TState>> Shares { get; }

    /// <summary>The recurrent class of each state by its number; −1 for transient states.</summary>
    internal int[] ClassOf { get; }

    /// <summary>The smallest positive probability of ending in a class.</summary>
    internal double SmallestEnding => _endings?.Where(ending => ending > 0).Min() ?? 1;

    /// <summary>How far the probabilities of ending in each class, from one start, are from summing to one.</summary>
    internal double EndingSumError => _endings is null ? 0 : Enumerable.Range(0, Chain.StateCount)
        .Max(from => Math.Abs(CompensatedSum.Of(_endings.AsSpan(from * Classes.Count, Classes.Count)) - 1));

    /// <summary>The probability of ending in a recurrent class.</summary>
    internal double Ending(int from, int end) =>
        Classes.Count == 1 ? 1
        : _endings is null ? (ClassOf[from] == end ? 1 : 0)
        : _endings[(from * Classes.Count) + end];

    /// <summary>The probability of ending in a recurrent class, from a distribution.</summary>
    internal double Ending(ReadOnlySpan<double> start, int end)
    {
        var sum = default(CompensatedSum);
        for (var from = 0; from < start.Length; from++)
        {
            if (start[from] > 0)
            {
                sum.Add(start[from] * Ending(from, end));
            }
        }

        return sum.Value;
    }

    /// <summary>The certificate of products of endings and shares.</summary>
    /// <param name="largest">The largest product.</param>
    /// <param name="smallest">The smallest positive product.</param>
    /// <param name="sumError">How far the products of one start are from summing to one, where that was asked for.</param>
    /// <param name="further">A bound on the relative error that comes on top of those of the two factors.</param>
    internal Certificate Certify(double largest, double smallest, double sumError, double further)
    {
        var weakest = Shares.MaxBy(shares => shares.Certificate.RelativeErrorBound)!.Certificate;
        var residual = Shares.Max(shares => shares.Certificate.Residual);
        var relative = Together(Together(weakest.RelativeErrorBound, _endingBound), further);
        var isProof = Options.CertificateLevel == CertificateLevel.Proof && relative < 1;
        var isNormal = double.IsNormal(smallest) || double.IsInfinity(smallest);
        return new Certificate
        {
            Method = _endings is null ? weakest.Method : $"state reduction with exit rates, then {weakest.Method}",
            Reason = _endings is null
                ? $"The structure says in which recurrent class each start ends. {weakest.Reason}"
                : $"Probabilities of ending in each recurrent class times the shares inside it. {weakest.Reason}",
            Residual = Options.CertificateLevel >= CertificateLevel.Residual ? Math.Max(Math.Max(residual, _endingResidual), sumError) : double.PositiveInfinity,
            RelativeErrorBound = isProof && isNormal ? relative : double.PositiveInfinity,
            AbsoluteErrorBound = isProof ? Math.Min(1, AbsoluteBound.From(relative, largest) + (isNormal ? 0 : double.Epsilon)) : double.PositiveInfinity,
            Basis = !isProof ? ErrorBasis.None : weakest.RelativeErrorBound >= _endingBound ? weakest.Basis : _endingBasis,
            IsProof = isProof,
            Iterations = weakest.Iterations,
        };
    }

    /// <summary>(1 + a)(1 + b) − 1, rounded up.</summary>
    private static double Together(double first, double second) =>
        double.IsInfinity(first) || double.IsInfinity(second) ? double.PositiveInfinity : Upward.Add(Upward.Add(first, second), Upward.Multiply(first, second));

    private void Store(double[] values, int[] transient, int end)
    {
        for (var k = 0; k < transient.Length; k++)
        {
            _endings![(transient[k] * Classes.Count) + end] = values[k];
        }
    }

    private double[] Column(int end) => [.. Enumerable.Range(0, Chain.StateCount).Select(from => Ending(from, end))];
}
