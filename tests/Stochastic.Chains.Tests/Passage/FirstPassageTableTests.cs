using MathNet.Numerics.LinearAlgebra;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Passage;

/// <summary>What the table of mean first passage times says about small invented chains and about any chain.</summary>
public class FirstPassageTableTests
{
    /// <summary>Invented: a pump, one step a week, ten weeks new, four worn and one failed on average.</summary>
    private static readonly Chain<Stage> Pump = Chain.Build<Stage>(rows => rows
        .Row(Stage.New, (Stage.New, 0.90), (Stage.Worn, 0.10))
        .Row(Stage.Worn, (Stage.Worn, 0.75), (Stage.Failed, 0.25))
        .Row(Stage.Failed, (Stage.New, 1.0)));

    /// <summary>Invented: a pool of crates that all leave it in the end; every crate is washed before it is sent out.</summary>
    private static readonly Chain<string> Pool = Chain.Build<string>(rows => rows
        .Row("dirty", ("dirty", 0.5), ("clean", 0.5))
        .Row("clean", ("out", 1))
        .Row("out", ("dirty", 0.7), ("lost", 0.2), ("scrapped", 0.1))
        .Row("lost", ("lost", 1))
        .Row("scrapped", ("yard", 1))
        .Row("yard", ("scrapped", 1)));

    [Fact]
    public void Times_of_the_pump_are_those_worked_out_by_hand()
    {
        var table = Pump.MeanFirstPassage().Require(relativeError: Tolerances.Published);

        Check(table[Stage.New, Stage.Worn], 10);
        Check(table[Stage.New, Stage.Failed], 14);
        Check(table[Stage.Worn, Stage.Failed], 4);
        Check(table[Stage.Worn, Stage.New], 5);
        Check(table[Stage.Failed, Stage.New], 1);
        Check(table[Stage.Failed, Stage.Worn], 11);
        Check(table[Stage.New, Stage.New], 1.5);
        Check(table[Stage.Worn, Stage.Worn], 15.0 / 4);
        Check(table[Stage.Failed, Stage.Failed], 15);
        Check(table.KemenyConstant, ((4 * 10) + (1 * 14)) / 15.0);
        table.KemenyErrorBound.Should().BeLessThan(Tolerances.Published);
    }

    [Fact]
    public void Times_of_a_chain_made_from_rates_come_back_in_their_unit()
    {
        // Invented: fails twice a year on average, repaired at a rate of 100 a year.
        var machine = Chain.FromRates([new TransitionRate<string>("runs", "stands", 2), new TransitionRate<string>("stands", "runs", 100)]);

        var table = machine.MeanFirstPassage();

        Check(table["runs", "stands"], 0.5);
        Check(table["stands", "runs"], 0.01);
        Check(table["runs", "runs"], 0.51);
        Check(table["stands", "stands"], 0.51);
        Check(table.KemenyConstant, 1.0 / 102);
    }

    [Fact]
    public void An_absorbing_state_of_rates_is_never_come_back_to()
    {
        var machine = Chain.FromRates([new TransitionRate<string>("runs", "broken", 2)]);

        var table = machine.MeanFirstPassage();

        Check(table["runs", "broken"], 0.5);
        table["broken", "broken"].Should().Be(double.PositiveInfinity);
        table["runs", "runs"].Should().Be(double.PositiveInfinity);
    }

    [Fact]
    public void A_chain_with_several_ends_is_answered_with_infinities_where_they_are_true()
    {
        var table = Pool.MeanFirstPassage();

        Check(table["dirty", "clean"], 2);
        Check(table["dirty", "out"], 3);
        Check(table["clean", "out"], 1);
        Check(table["scrapped", "yard"], 1);
        Check(table["yard", "yard"], 2);
        table["lost", "lost"].Should().Be(1);
        table["out", "clean"].Should().Be(double.PositiveInfinity);
        table["dirty", "lost"].Should().Be(double.PositiveInfinity);
        table["dirty", "yard"].Should().Be(double.PositiveInfinity);
        table["lost", "yard"].Should().Be(double.PositiveInfinity);
        table["dirty", "dirty"].Should().Be(double.PositiveInfinity);
        table.Certificate.IsProof.Should().BeTrue();
    }

    [Fact]
    public void Figures_that_follow_from_the_moves_alone_are_exact()
    {
        var table = Chain.FromMatrix(new[,] { { 1.0, 0 }, { 0, 1 } }).MeanFirstPassage();

        table.Certificate.Basis.Should().Be(ErrorBasis.Structure);
        table.Certificate.RelativeErrorBound.Should().Be(0);
        table.Values.ToArray().Should().Equal(1, double.PositiveInfinity, double.PositiveInfinity, 1);
    }

    [Fact]
    public void Kemenys_constant_counts_recurrent_states_only()
    {
        var chain = Chain.Build<string>(rows => rows
            .Row("new", ("new", 0.5), ("a", 0.5))
            .Row("a", ("b", 1))
            .Row("b", ("a", 0.5), ("b", 0.5)));

        var table = chain.MeanFirstPassage();

        Check(table.KemenyConstant, 2.0 / 3);
        Check(table["new", "a"], 2);
        Check(table["new", "b"], 3);
    }

    [Fact]
    public void Kemenys_constant_of_a_single_recurrent_state_is_zero() =>
        Chain.FromMatrix(new[,] { { 0.5, 0.5 }, { 0, 1 } }).MeanFirstPassage().KemenyConstant.Should().Be(0);

    [Fact]
    public void The_table_can_be_read_by_rows_columns_pairs_and_as_matrices()
    {
        var table = Pump.MeanFirstPassage();

        table.TimesFrom(Stage.New).Select(time => time.Mean).Should().Equal(table.Values[..3].ToArray());
        table.TimesTo(Stage.New).Should().Contain(new FirstPassageTime<Stage>(Stage.Worn, Stage.New, table[Stage.Worn, Stage.New]));
        table.Times().Select(time => time.Mean).Should().Equal(table.Values.ToArray());
        table.ToArray()[0, 2].Should().Be(table[Stage.New, Stage.Failed]);
        table.ToMatrix().Equals(Matrix<double>.Build.DenseOfArray(table.ToArray())).Should().BeTrue();
        table.States.Should().Equal(Pump.States);
    }

    [Fact]
    public void The_text_fits_a_terminal_in_every_culture()
    {
        using var culture = new CommaCulture();
        Pump.MeanFirstPassage().ToString().Should().Contain("3.75").And.Contain("from \\ to");
        var size = 60;
        var lines = ChainFamilies.Named("random dense").Create(size, 3).ToChain().MeanFirstPassage().ToString().Split(Environment.NewLine);

        lines.Should().HaveCountLessThan(30).And.OnlyContain(line => line.Length <= 80);
        lines[^2].Should().Be($"… and {size - 24} more rows");
        lines[^1].Should().EndWith("more columns");
    }

    [Fact]
    public void A_refined_column_is_proved_to_the_last_digits()
    {
        var sample = ChainFamilies.Named("nearly decomposable").Create(30, 5);
        var table = sample.ToChain().MeanFirstPassage(new SolveOptions { CertificateLevel = CertificateLevel.None });

        var column = table.Refine(7);

        column.Certificate.RelativeErrorBound.Should().BeLessThanOrEqualTo(Tolerances.FourRoundings);
        foreach (var (from, to, mean) in table.TimesTo(7))
        {
            if (from != to)
            {
                (Math.Abs(mean - column.Mean(from)) / column.Mean(from)).Should().BeLessThanOrEqualTo(Tolerances.SubtractionFree(30));
            }
        }
    }

    private static void Check(double actual, double expected) =>
        actual.Should().BeInRange(expected * (1 - Tolerances.SubtractionFree(6)), expected * (1 + Tolerances.SubtractionFree(6)));
}
