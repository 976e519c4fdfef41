using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Steps;

/// <summary>A distribution on its way, one multiplication for each step, with what its certificate needs.</summary>
internal sealed class StepPath<TState>
    where TState : notnull
{
    /// <summary>Beside the additions of a step: the row sum, the division by it, the stay, and the product.</summary>
    internal const int RoundingsPerStep = 8;

    private const double SmallestNormal = 2.2250738585072014e-308;

    private readonly StateSpace<TState> _states;
    private double[] _current;
    private double[] _next;
    private StepMatrix? _settledUnder;
    private double _roundings;

    internal StepPath(Distribution<TState> start)
    {
        _states = start.States;
        _current = start.ToArray();
        _next = new double[_current.Length];
    }

    internal ReadOnlySpan<double> Current => _current;

    /// <summary>The number of steps gone.</summary>
    internal long Steps { get; private set; }

    /// <summary>The number of multiplications made; fewer than the steps when steps stopped changing anything.</summary>
    internal long Made { get; private set; }

    /// <summary>Whether no product has left the range in which it rounds once.</summary>
    internal bool StaysInRange { get; private set; } = true;

    /// <summary>The roundings of one step, in units of 2⁻⁵³.</summary>
    internal static double RoundingsOf(StepMatrix matrix) => matrix.LargestIndegree + matrix.StayRoundings + RoundingsPerStep;

    /// <summary>Whether the last step with this matrix changed nothing: the same numbers give the same numbers, so no further one will.</summary>
    internal bool IsSettledUnder(StepMatrix matrix) => ReferenceEquals(_settledUnder, matrix);

    /// <summary>Goes some steps with one matrix; more than one at once only where nothing changes any more.</summary>
    internal void Advance(StepMatrix matrix, long steps)
    {
        _roundings += steps * RoundingsOf(matrix);
        Steps += steps;
        if (IsSettledUnder(matrix))
        {
            return;
        }

        StaysInRange = StaysInRange && SmallestPositive(_current) * matrix.SmallestProbability >= SmallestNormal;
        matrix.Multiply(_current, _next);
        Made++;
        _settledUnder = _current.AsSpan().SequenceEqual(_next) ? matrix : null;
        (_current, _next) = (_next, _current);
    }

    internal StepDistribution<TState> ToDistribution(SolveOptions options) => new(_states, [.. _current], Steps, Certify(options));

    internal Certificate Certify(SolveOptions options)
    {
        var relative = SubtractionFreeBound.OfRoundings(_roundings);
        var isProof = options.CertificateLevel == CertificateLevel.Proof && double.IsFinite(relative);
        var lost = (double)Steps * _current.Length * double.Epsilon;
        return new Certificate
        {
            Method = "propagation",
            Reason = Made < Steps
                ? "One multiplication for each step; stopped early because a step changed nothing any more."
                : "One multiplication for each step; no power of the matrix is formed.",
            Residual = options.CertificateLevel >= CertificateLevel.Residual ? Math.Abs(CompensatedSum.Of(_current) - 1) : double.PositiveInfinity,
            RelativeErrorBound = isProof && StaysInRange ? relative : double.PositiveInfinity,
            AbsoluteErrorBound = isProof ? AbsoluteBound.From(relative, _current.Max()) + (StaysInRange ? 0 : lost) : double.PositiveInfinity,
            Basis = isProof ? ErrorBasis.SubtractionFree : ErrorBasis.None,
            IsProof = isProof,
            Iterations = Made,
        };
    }

    internal static double SmallestPositive(ReadOnlySpan<double> values)
    {
        var smallest = double.PositiveInfinity;
        foreach (var value in values)
        {
            if (value > 0 && value < smallest)
            {
                smallest = value;
            }
        }

        return smallest;
    }
}
