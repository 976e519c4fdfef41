using Stochastic.Chains.Kernels;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Kernels;

/// <summary>A system of first steps over some states of a chain, with exact solutions.</summary>
internal sealed class PassageTrial
{
    private readonly SampleChain _sample;

    internal PassageTrial(SampleChain sample, int[] states, double[] given, double[] elsewhere, Rational[] exact)
    {
        _sample = sample;
        States = states;
        Given = given;
        Elsewhere = elsewhere;
        Exact = exact;
    }

    internal int[] States { get; }

    /// <summary>The right-hand side, by position in the system.</summary>
    internal double[] Given { get; }

    /// <summary>The given values by state; zero at the states of the system.</summary>
    internal double[] Elsewhere { get; }

    /// <summary>The solution by position in the system.</summary>
    internal Rational[] Exact { get; }

    internal DenseRates Dense => new([.. _sample.Matrix.Cast<double>()], _sample.StateCount);

    internal bool IsInRange => States.Length > 0 && Exact.All(value => double.IsNormal(value.ToDouble()));

    /// <summary>Rates among the states and one column for all exits.</summary>
    internal double[] Table
    {
        get
        {
            var columns = States.Length + 1;
            var table = new double[States.Length * columns];
            for (var k = 0; k < States.Length; k++)
            {
                for (var to = 0; to < _sample.StateCount; to++)
                {
                    var column = Array.IndexOf(States, to);
                    table[(k * columns) + (column < 0 ? States.Length : column)] += _sample.Matrix[States[k], to];
                }
            }

            return table;
        }
    }

    /// <summary>Mean steps to the target of the family, or to state 0.</summary>
    internal static PassageTrial TimesOf(SampleChain sample)
    {
        var target = sample.Target ?? 0;
        int[] states = [.. Enumerable.Range(0, sample.StateCount).Where(state => state != target)];
        var exact = sample.ToExact().HittingMean(target);
        return new(sample, states, [.. states.Select(_ => 1.0)], new double[sample.StateCount], [.. states.Select(state => exact[state]!.Value)]);
    }

    /// <summary>Probabilities of ending in the first recurrent class, over the transient states that can.</summary>
    internal static PassageTrial EndsOf(SampleChain sample)
    {
        var chain = sample.ToExact();
        var exact = chain.ReachingProbability(chain.Structure.RecurrentClasses[0].States);
        int[] states = [.. Enumerable.Range(0, sample.StateCount).Where(state => !chain.Structure.Classes[chain.Structure.ClassOf[state]].IsClosed && !exact[state].IsZero)];
        var elsewhere = Array.ConvertAll(exact, value => value.ToDouble());
        foreach (var state in states)
        {
            elsewhere[state] = 0;
        }

        return new(sample, states, new double[states.Length], elsewhere, [.. states.Select(state => exact[state])]);
    }

    /// <summary>The exact solution by state, every second entry off by so much of itself.</summary>
    internal double[] Wrong(double error)
    {
        var values = Elsewhere.ToArray();
        for (var k = 0; k < States.Length; k++)
        {
            values[States[k]] = Exact[k].ToDouble() * (1 + (k % 2 * error));
        }

        return values;
    }

    internal double TrueError(double[] values) => States.Select((state, k) => Exact[k].RelativeDifference(values[state])).Max();

    /// <summary>About how many jumps it takes, at worst, to leave the states.</summary>
    internal double Jumps
    {
        get
        {
            var columns = States.Length + 1;
            var table = Table.Select(rate => (ScaledDouble)rate).ToArray();
            var jumps = new ScaledDouble[States.Length];
            for (var k = 0; k < jumps.Length; k++)
            {
                for (var column = 0; column < columns; column++)
                {
                    jumps[k] += column == k ? 0 : table[(k * columns) + column];
                }
            }

            var reduction = new GeneralReduction<ScaledDouble>(table, States.Length, columns, States.Length);
            reduction.Eliminate(null, CancellationToken.None);
            reduction.SolveRight(jumps);
            return jumps.Max(number => number.ToDouble());
        }
    }

    public override string ToString() => _sample.ToString();
}
