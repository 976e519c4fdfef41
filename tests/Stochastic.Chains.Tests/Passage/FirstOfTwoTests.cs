using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Passage;

public class FirstOfTwoTests
{
    private static readonly Chain<string> Pool = Chain.Build<string>(rows => rows
        .Row("clean", ("at shop", 0.9), ("lost", 0.1))
        .Row("at shop", ("clean", 0.7), ("in repair", 0.1), ("scrapped", 0.2))
        .Row("in repair", ("clean", 1))
        .Row("lost", ("lost", 1))
        .Row("scrapped", ("scrapped", 1)));

    public static TheoryData<string> Families => [.. ChainFamilies.All.Select(family => family.Name)];

    [Theory]
    [MemberData(nameof(Families))]
    public void No_probability_is_off_by_more_than_its_bound(string name)
    {
        foreach (var sample in ChainFamilies.Named(name).Samples(25, 16).Where(sample => sample.StateCount > 1))
        {
            var (first, second) = (0, sample.StateCount - 1);
            var race = sample.ToChain().Before(first, second);
            var stopped = ExactChain.FromTransitions(
                sample.StateCount, sample.Transitions.Where(move => move.From != first && move.From != second).Append((first, first, 1)).Append((second, second, 1)));
            var toFirst = stopped.ReachingProbability(first);
            var toSecond = stopped.ReachingProbability(second);
            for (var state = 0; state < sample.StateCount; state++)
            {
                race.Certificate.IsProof.Should().BeTrue(sample.ToString());
                toFirst[state].RelativeDifference(race.Probability(state)).Should().BeLessThanOrEqualTo(race.Certificate.RelativeErrorBound, sample.ToString());
                toSecond[state].RelativeDifference(race.ProbabilityOfSecond(state)).Should().BeLessThanOrEqualTo(race.Certificate.RelativeErrorBound, sample.ToString());
                (1 - toFirst[state] - toSecond[state]).RelativeDifference(race.ProbabilityOfNeither(state))
                    .Should().BeLessThanOrEqualTo(race.Certificate.RelativeErrorBound, sample.ToString());
            }
        }
    }

    [Fact]
    public void Neither_may_come_and_the_ends_count_as_reached_at_once()
    {
        var race = Pool.Before("in repair", "lost");

        race.Probability("in repair").Should().Be(1);
        race.Probability("lost").Should().Be(0);
        race.ProbabilityOfSecond("lost").Should().Be(1);
        race.ProbabilityOfNeither("scrapped").Should().Be(1);
        (race.Probability("clean") + race.ProbabilityOfSecond("clean") + race.ProbabilityOfNeither("clean"))
            .Should().BeApproximately(1, Tolerances.SubtractionFree(5));
        race.Firsts.Should().Equal("in repair");
        race.Seconds.Should().Equal("lost");
        race.ToString().Should().StartWith("First 'in repair' or second 'lost'");
    }

    [Fact]
    public void Ruin_of_a_gambler_is_that_of_the_textbook()
    {
        // Feller, An Introduction to Probability Theory and Its Applications, vol. 1, chapter XIV: (from memory) with p = 0.4 and 10 units in all,
        // starting with 9, the probability of ruin before the goal is (r^9 - r^10) / (1 - r^10) with r = q/p = 1.5.
        var chain = Chain.FromTransitions(Enumerable.Range(0, 11).SelectMany(k => k is 0 or 10
            ? new[] { new Transition<int>(k, k, 1) }
            : [new Transition<int>(k, k + 1, 0.4), new Transition<int>(k, k - 1, 0.6)]));

        var exact = (Math.Pow(1.5, 9) - Math.Pow(1.5, 10)) / (1 - Math.Pow(1.5, 10));
        chain.Before(0, 10).Probability(9).Should().BeApproximately(exact, exact * Tolerances.Published);
    }

    [Fact]
    public void Sets_may_be_given_and_bad_ones_are_refused()
    {
        var options = new SolveOptions { CertificateLevel = CertificateLevel.None };

        Pool.BeforeAny(["lost", "lost"], ["scrapped", "in repair"], options).Probability("clean").Should().BeApproximately(0.1 / 0.37, Tolerances.SubtractionFree(5));
        Pool.Invoking(pool => pool.Before("lost", "lost")).Should().Throw<ArgumentException>().WithMessage("'lost' is on both sides*");
        Pool.Invoking(pool => pool.BeforeAny([], ["lost"], options)).Should().Throw<ArgumentException>().WithMessage("No target states*");
        Pool.Invoking(pool => pool.BeforeAny(["lost"], [], options)).Should().Throw<ArgumentException>().WithMessage("No target states*");
        Pool.Invoking(pool => pool.Before("lost", "broken")).Should().Throw<UnknownStateException>();
    }
}
