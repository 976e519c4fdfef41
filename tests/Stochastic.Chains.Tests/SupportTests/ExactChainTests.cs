using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.SupportTests;

/// <summary>The oracle against plain elimination in fractions, over every family.</summary>
public class ExactChainTests
{
    private const int PerFamily = 15;
    private const int LargestSize = 6;

    public static TheoryData<string> Families => [.. ChainFamilies.All.Select(family => family.Name)];

    public static TheoryData<string> IrreducibleFamilies => [.. ChainFamilies.Irreducible.Select(family => family.Name)];

    [Theory]
    [MemberData(nameof(IrreducibleFamilies))]
    public void Stationary_distribution_solves_its_equations(string family)
    {
        foreach (var (sample, chain) in Samples(family))
        {
            chain.Stationary().Should().Equal(PlainElimination.Stationary(chain), "{0}", sample);
        }
    }

    [Theory]
    [MemberData(nameof(IrreducibleFamilies))]
    public void Passage_table_agrees_with_one_elimination_for_each_target(string family)
    {
        foreach (var (sample, chain) in Samples(family))
        {
            var table = chain.MeanFirstPassage();
            for (var target = 0; target < chain.StateCount; target++)
            {
                int[] others = [.. Enumerable.Range(0, chain.StateCount).Where(state => state != target)];
                var means = PlainElimination.SolveAmong(chain, others, _ => 1);

                others.Select(from => table[from, target]!.Value).Should().Equal(means, "{0}", sample);
                others.Select(from => chain.HittingMean(target)[from]!.Value).Should().Equal(means, "{0}", sample);
                table[target, target].Should().Be(1 / chain.Stationary()[target], "{0}", sample);
                table[target, target].Should().Be(chain.MeanRecurrence(target), "{0}", sample);
            }
        }
    }

    [Theory]
    [MemberData(nameof(Families))]
    public void Absorption_agrees_with_plain_elimination(string family)
    {
        foreach (var (sample, chain) in Samples(family))
        {
            var transient = chain.Structure.TransientStates;
            var means = chain.AbsorptionMean();
            var probabilities = chain.AbsorptionProbabilities();

            transient.Select(state => means[state]).Should()
                .Equal(PlainElimination.SolveAmong(chain, transient, _ => 1), "{0}", sample);
            for (var k = 0; k < chain.Structure.RecurrentClasses.Count; k++)
            {
                var recurrent = chain.Structure.RecurrentClasses[k].States;
                transient.Select(state => probabilities[state, k]).Should().Equal(
                    PlainElimination.SolveAmong(chain, transient, state => Flow(chain, state, recurrent)), "{0}", sample);
                recurrent.Should().OnlyContain(state => probabilities[state, k] == Rational.One && means[state].IsZero);
            }

            var classes = Enumerable.Range(0, chain.Structure.RecurrentClasses.Count);
            Enumerable.Range(0, chain.StateCount).Should()
                .OnlyContain(state => Rational.Sum(classes.Select(k => probabilities[state, k])) == Rational.One);
        }
    }

    [Theory]
    [MemberData(nameof(Families))]
    public void Hitting_times_and_probabilities_of_the_first_state_agree_with_plain_elimination(string family)
    {
        foreach (var (sample, chain) in Samples(family))
        {
            var reaching = chain.ReachingProbability(0);
            int[] possible = [.. Enumerable.Range(1, chain.StateCount - 1).Where(state => !reaching[state].IsZero)];
            int[] certain = [.. Enumerable.Range(1, chain.StateCount - 1).Where(state => reaching[state] == Rational.One)];
            var mean = chain.HittingMean(0);

            possible.Select(state => reaching[state]).Should().Equal(
                PlainElimination.SolveAmong(chain, possible, state => Flow(chain, state, [0])), "{0}", sample);
            Enumerable.Range(1, chain.StateCount - 1).Where(state => mean[state] is not null).Should().Equal(certain, "{0}", sample);
            certain.Select(state => mean[state]!.Value).Should().Equal(
                PlainElimination.SolveAmong(chain, certain, _ => 1), "{0}", sample);
            mean[0].Should().Be(Rational.Zero);
        }
    }

    [Theory]
    [MemberData(nameof(Families))]
    public void Variance_solves_the_second_moment_equation_with_the_given_self_loops(string family)
    {
        foreach (var (sample, chain) in Samples(family))
        {
            var mean = chain.HittingMean(0);
            int[] certain = [.. Enumerable.Range(1, chain.StateCount - 1).Where(state => mean[state] is not null)];
            var expected = PlainElimination.SolveAmong(chain, certain, state => chain.SelfLoop(state) + Rational.Sum(chain.Row(state).Moves
                .Select(move => move.Probability * Rational.Pow(1 + mean[move.To]!.Value - mean[state]!.Value, 2))));

            certain.Select(state => chain.HittingVariance(0)[state]!.Value).Should().Equal(expected, "{0}", sample);
        }
    }

    [Theory]
    [MemberData(nameof(Families))]
    public void Steps_multiply_and_a_row_is_divided_by_its_sum(string family)
    {
        foreach (var (sample, chain) in Samples(family))
        {
            var one = chain.NStepMatrix(1);
            var three = chain.NStepMatrix(3);
            for (var i = 0; i < chain.StateCount; i++)
            {
                var given = chain.Row(i).Moves.Select(move => move.Probability).Append(chain.SelfLoop(i));
                foreach (var move in chain.Row(i).Moves)
                {
                    one[i, move.To].Should().Be(move.Probability / Rational.Sum(given), "{0}", sample);
                }

                for (var j = 0; j < chain.StateCount; j++)
                {
                    var product = from k in Enumerable.Range(0, chain.StateCount)
                                  from l in Enumerable.Range(0, chain.StateCount)
                                  select one[i, k] * one[k, l] * one[l, j];
                    three[i, j].Should().Be(Rational.Sum(product), "{0}", sample);
                }
            }
        }
    }

    private static IEnumerable<(SampleChain Sample, ExactChain Chain)> Samples(string family)
    {
        var samples = ChainFamilies.Named(family).Samples(PerFamily, LargestSize).ToArray();
        samples.Should().HaveCount(PerFamily);
        return samples.Select(sample => (sample, sample.ToExact()));
    }

    private static Rational Flow(ExactChain chain, int from, int[] into) =>
        Rational.Sum(chain.Row(from).Moves.Where(move => into.Contains(move.To)).Select(move => move.Probability));
}
