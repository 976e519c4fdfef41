using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;
using Stochastic.Chains.LongRun;

namespace Stochastic.Chains;

/// <summary>The share of time in each state in the long run, from one start; where the distribution settles, also what it settles to.</summary>
/// <typeparam name="TState">The type of a state.</typeparam>
/// <remarks>
/// The share is the limit of the averages over the first n steps, which always exists (Cesàro). When <see cref="HasLimit"/> it is the limit of the
/// distribution after n steps too; else that goes round in a cycle of <see cref="Period"/> steps and <see cref="AtPhase(long)"/> gives each of its
/// limits. When the chain can end in several recurrent classes these are averages over the ends: a single item ends in one of them. The
/// residual of the certificate is the largest of those of the probabilities of the ends and of the shares inside them, and of |sum − 1|.
/// Immutable and safe for concurrent use.
/// </remarks>
/// <example>
/// <code>
/// LongRunDistribution&lt;string&gt; inTheEnd = pool.StartingIn("clean").LongRun();
/// double lost = inTheEnd["lost"];
/// </code>
/// </example>
public sealed class LongRunDistribution<TState> : Distribution<TState>, ICertified
    where TState : notnull
{
    private const int RoundingsOfProduct = 2;
    private const int RoundingsOfMixture = 6;

    private readonly LongRunParts<TState> _parts;
    private readonly double[] _start;
    private readonly Lazy<(double[] Values, double RelativeErrorBound)[]> _phased;

    private LongRunDistribution(LongRunParts<TState> parts, double[] start, double[] values, Certificate certificate)
        : base(parts.Chain.States, values)
    {
        _parts = parts;
        _start = start;
        _phased = new(() => [.. parts.Classes.Select((group, end) => group.Period > 1 ? PhasedEndings<TState>.Of(parts, end) : ([], 0))], LazyThreadSafetyMode.PublicationOnly);
        Certificate = certificate;
    }

    /// <inheritdoc/>
    public Certificate Certificate { get; }

    /// <summary>Gets whether the distribution after n steps settles: whether no class in which this start can end moves in cycles.</summary>
    public bool HasLimit => Ends.All(end => _parts.Classes[end].Period == 1);

    /// <summary>Gets the length of the cycle that the distribution after n steps settles into; 1 when it settles. A shorter one may do for some starts.</summary>
    /// <exception cref="OverflowException">The classes have so many different periods that their common multiple exceeds 2⁶³ − 1.</exception>
    public long Period => Ends.Aggregate(1L, (period, end) => Divisors.LeastCommonMultiple(period, _parts.Classes[end].Period));

    /// <summary>The bound for a product of the probability of an end and a share.</summary>
    internal static double ProductError => SubtractionFreeBound.OfRoundings(RoundingsOfProduct);

    private IEnumerable<int> Ends => Enumerable.Range(0, _parts.Classes.Count).Where(end => _parts.Ending(_start, end) > 0);

    /// <summary>Finds what the distribution settles to when only the steps phase, phase + period, phase + 2 · period, … are looked at.</summary>
    /// <param name="phase">The first step to look at, 0 or more; steps that differ by <see cref="Period"/> give the same limit.</param>
    /// <returns>The limit with its certificate. When <see cref="HasLimit"/>, the same for every phase.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The phase is negative.</exception>
    /// <exception cref="MemoryLimitException">The transient states, each counted as often as the period, are too many for a direct solve.</exception>
    /// <exception cref="NumericalRangeException">The probability of an end is smaller than a double can hold.</exception>
    /// <remarks>The first call solves a system of t · d states for each class of period d, with t the number of transient states: O((t · d)³).</remarks>
    public CyclicLimit<TState> AtPhase(long phase)
    {
        if (phase < 0)
        {
            throw new ArgumentOutOfRangeException(nameof(phase), phase, Messages.NegativeSteps(phase));
        }

        var values = new double[Count];
        var further = MixtureError;
        for (var end = 0; end < _parts.Classes.Count; end++)
        {
            further = Math.Max(further, Fill(end, phase, values));
        }

        return new CyclicLimit<TState>(States, values, phase, Evidence(_parts, values, further));
    }

    /// <summary>The long-run shares from a start.</summary>
    internal static LongRunDistribution<TState> Of(LongRunParts<TState> parts, double[] start)
    {
        var values = new double[start.Length];
        for (var end = 0; end < parts.Classes.Count; end++)
        {
            var ending = parts.Ending(start, end);
            foreach (var member in parts.Classes[end].Members)
            {
                values[member] = ending * parts.Shares[end].Values[member];
            }
        }

        return new LongRunDistribution<TState>(parts, start, values, Evidence(parts, values, IsCertain(start) ? ProductError : MixtureError));
    }

    private static bool IsCertain(double[] start) => start.Count(value => value > 0) == 1 && start.Max() == 1;

    /// <summary>The bound where the probabilities of an end are averaged over several starts before.</summary>
    private static double MixtureError => SubtractionFreeBound.OfRoundings(RoundingsOfMixture);

    private static Certificate Evidence(LongRunParts<TState> parts, double[] values, double further)
    {
        var smallest = values.Where(value => value > 0).Min();
        return parts.Certify(values.Max(), smallest, Math.Abs(CompensatedSum.Of(values) - 1), further);
    }

    /// <summary>Writes the limits of one class and returns the bound on what they are further off.</summary>
    private double Fill(int end, long phase, double[] values)
    {
        var group = _parts.Classes[end];
        var phases = PhasedEndings<TState>.Phases(States, group);
        var (endings, bound) = _phased.Value[end];
        for (var cycle = 0; cycle < group.Period; cycle++)
        {
            var offset = (int)((cycle - (phase % group.Period) + group.Period) % group.Period);
            var ending = group.Period == 1 ? _parts.Ending(_start, end) : Ending(endings, group.Period, offset);
            foreach (var member in group.Members.Where(member => phases[member] == cycle))
            {
                values[member] = ending * group.Period * _parts.Shares[end].Values[member];
            }
        }

        return Upward.Add(bound, MixtureError);
    }

    private double Ending(double[] endings, int period, int offset)
    {
        var sum = default(CompensatedSum);
        for (var from = 0; from < _start.Length; from++)
        {
            sum.Add(_start[from] * endings[(from * period) + offset]);
        }

        return sum.Value;
    }
}
