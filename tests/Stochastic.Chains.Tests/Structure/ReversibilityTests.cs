namespace Stochastic.Chains.Tests.Structure;

public class ReversibilityTests
{
    [Fact]
    public void A_birth_death_chain_is_reversible_however_graded_it_is()
    {
        var moves = Enumerable.Range(0, 20).SelectMany(k => new[] { new Transition<int>(k, k + 1, 1e-30), new Transition<int>(k + 1, k, 0.5) })
            .Concat(Enumerable.Range(0, 21).Select(k => new Transition<int>(k, k, k == 0 ? 1 : 0.5)));

        var verdict = Chain.FromTransitions(moves).Reversibility();

        verdict.IsReversible.Should().BeTrue();
        verdict.LargestDeviation.Should().BeLessThan(1e-14);
    }

    [Fact]
    public void A_one_way_round_trip_is_not_reversible_and_a_witness_shows_it()
    {
        var chain = Chain.FromMatrix(new[,] { { 0, 0.7, 0.3 }, { 0.3, 0, 0.7 }, { 0.7, 0.3, 0 } });

        var verdict = chain.Reversibility();

        verdict.IsReversible.Should().BeFalse();
        verdict.LargestDeviation.Should().BeGreaterThan(0.5);
        verdict.Witness.Should().NotBeNull();
        verdict.ToString().Should().StartWith("not reversible: ");
    }

    [Fact]
    public void A_move_without_a_way_back_is_a_witness()
    {
        var chain = Chain.FromMatrix(new double[,] { { 0, 1, 0 }, { 0, 0, 1 }, { 1, 0, 0 } });

        chain.Reversibility().LargestDeviation.Should().Be(1);
        chain.Reversibility().IsReversible.Should().BeFalse();
    }

    [Fact]
    public void Transient_states_play_no_part()
    {
        var chain = Chain.Build<string>(rows => rows.Row("in", ("a", 1)).Row("a", ("b", 1)).Row("b", ("a", 0.2), ("b", 0.8)));

        chain.Reversibility().IsReversible.Should().BeTrue();
    }

    [Fact]
    public void The_tolerance_decides_about_small_deviations()
    {
        var almost = Chain.FromMatrix(new[,] { { 0, 0.5, 0.5 }, { 0.5 + 1e-6, 0, 0.5 - 1e-6 }, { 0.5, 0.5, 0 } });

        almost.Reversibility().IsReversible.Should().BeFalse();
        almost.Reversibility(1e-4).IsReversible.Should().BeTrue();
        almost.Invoking(chain => chain.Reversibility(-1)).Should().Throw<ArgumentOutOfRangeException>();
        almost.Invoking(chain => chain.Reversibility(1)).Should().Throw<ArgumentOutOfRangeException>();
    }
}
