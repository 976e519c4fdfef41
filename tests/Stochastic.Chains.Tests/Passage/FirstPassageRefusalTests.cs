namespace Stochastic.Chains.Tests.Passage;

/// <summary>Which tables of mean first passage times are refused, and how; where the range of a double is left on the way.</summary>
public class FirstPassageRefusalTests
{
    [Fact]
    public void A_mean_time_beyond_the_range_of_a_double_is_refused_by_name()
    {
        var chain = Chain.Build<string>(rows => rows.Row("a", ("a", 1), ("b", 1e-200)).Row("b", ("a", 1), ("end", 1e-200)).Row("end", ("a", 1)));

        chain.Invoking(it => it.MeanFirstPassage()).Should().Throw<NumericalRangeException>()
            .WithMessage("The mean time from 'a' to 'end' is about 10^400*").Which.State.Should().Be("a");
    }

    [Fact]
    public void Products_below_the_range_on_the_way_to_ordinary_times_are_carried_with_wider_exponents()
    {
        var chain = Chain.Build<string>(rows => rows
            .Row("a", ("a", 1), ("b", 1e-200))
            .Row("b", ("c", 1e-200), ("b", 1))
            .Row("c", ("d", 1e-200), ("c", 1))
            .Row("d", ("a", 1e-200), ("d", 1)));

        var table = chain.MeanFirstPassage();

        table.Certificate.IsProof.Should().BeTrue();
        table["a", "d"].Should().BeInRange(2.9999999999999e200, 3.0000000000001e200);
    }

    [Fact]
    public void Times_among_transient_states_that_nobody_asks_for_may_be_out_of_range()
    {
        // From "b" the state "a" may never be come back to: infinite. From "a" the state "b" is passed surely.
        var chain = Chain.Build<string>(rows => rows
            .Row("a", ("b", 1e-200), ("a", 1))
            .Row("b", ("a", 1e-250), ("end", 1))
            .Row("c", ("a", 1))
            .Row("end", ("end", 1)));

        var table = chain.MeanFirstPassage();

        table["a", "b"].Should().BeInRange(0.9999999999999e200, 1.0000000000001e200);
        table["c", "a"].Should().Be(1);
        table["b", "a"].Should().Be(double.PositiveInfinity);
    }

    [Fact]
    public void Kemenys_constant_of_several_classes_is_refused_with_the_classes()
    {
        var table = Chain.FromMatrix(new[,] { { 1.0, 0 }, { 0, 1 } }).MeanFirstPassage();

        table.Invoking(it => it.KemenyConstant).Should().Throw<ChainStructureException>()
            .WithMessage("*2 recurrent classes*{'0'}; {'1'}*Absorption()*").Which.States.Should().Equal("0", "1");
        table.Invoking(it => it.KemenyErrorBound).Should().Throw<ChainStructureException>();
        table.Invoking(it => it.KemenySpread).Should().Throw<ChainStructureException>();
    }

    [Fact]
    public void Bad_questions_are_refused()
    {
        var chain = Chain.FromMatrix(new[,] { { 0.5, 0.5 }, { 0.5, 0.5 } });
        var table = chain.MeanFirstPassage();

        chain.Invoking(it => it.MeanFirstPassage(null!)).Should().Throw<ArgumentNullException>();
        chain.Invoking(it => it.MeanFirstPassage(new SolveOptions { MemoryLimit = 1 })).Should().Throw<MemoryLimitException>();
        chain.Invoking(it => it.MeanFirstPassage(new SolveOptions { CancellationToken = new CancellationToken(true) }))
            .Should().Throw<OperationCanceledException>();
        table.Invoking(it => it[0, 2]).Should().Throw<UnknownStateException>();
        table.Invoking(it => it[2, 0]).Should().Throw<UnknownStateException>();
        table.Invoking(it => it.TimesTo(2)).Should().Throw<UnknownStateException>();
        table.Invoking(it => it.TimesFrom(2)).Should().Throw<UnknownStateException>();
        table.Invoking(it => it.Refine(2)).Should().Throw<UnknownStateException>();
    }

    [Fact]
    public void Less_evidence_is_no_proof()
    {
        var chain = Chain.FromMatrix(new[,] { { 0.5, 0.5 }, { 0.5, 0.5 } });

        var none = chain.MeanFirstPassage(new SolveOptions { CertificateLevel = CertificateLevel.None });
        var residual = chain.MeanFirstPassage(new SolveOptions { CertificateLevel = CertificateLevel.Residual });

        none.Certificate.Residual.Should().Be(double.PositiveInfinity);
        none.Certificate.IsProof.Should().BeFalse();
        none.KemenyErrorBound.Should().Be(double.PositiveInfinity);
        residual.Certificate.Residual.Should().BeInRange(0, 1);
        residual.Certificate.RelativeErrorBound.Should().Be(double.PositiveInfinity);
    }

    [Fact]
    public void Progress_is_reported_in_rising_parts()
    {
        var size = 300;
        var matrix = new double[size, size];
        for (var from = 0; from < size; from++)
        {
            for (var to = 0; to < size; to++)
            {
                matrix[from, to] = (from == to ? size + 1 : 1) / (2.0 * size);
            }
        }

        var heard = new List<double>();

        Chain.FromMatrix(matrix).MeanFirstPassage(new SolveOptions { Progress = new Listener(heard) });

        heard.Should().HaveCountGreaterThan(1).And.BeInAscendingOrder().And.OnlyContain(fraction => fraction > 0 && fraction <= 1);
    }

    private sealed class Listener(List<double> heard) : IProgress<SolveProgress>
    {
        public void Report(SolveProgress value) => heard.Add(value.Fraction);
    }
}
