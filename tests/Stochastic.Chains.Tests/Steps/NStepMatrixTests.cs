using Stochastic.Chains.Kernels;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Steps;

public class NStepMatrixTests
{
    private static readonly Chain<string> Pump = Chain.Build<string>(rows => rows
        .Row("new", ("new", 0.90), ("worn", 0.10))
        .Row("worn", ("worn", 0.75), ("failed", 0.25))
        .Row("failed", ("new", 1.0)));

    private static Chain<int> Dense(int states) => ChainFamilies.Named("random dense").Create(states, 7).ToChain();

    [Fact]
    public void No_steps_give_the_identity_and_one_step_the_probabilities_as_given()
    {
        Pump.NStep(0).Values.ToArray().Should().Equal(1, 0, 0, 0, 1, 0, 0, 0, 1);
        Pump.NStep(1).ToArray().Should().BeEquivalentTo(Pump.ToArray());
        foreach (var steps in new[] { 0, 1 })
        {
            Pump.NStep(steps, new SpectralMethod()).Certificate.Should().Match<Certificate>(proof =>
                proof.IsProof && proof.RelativeErrorBound == 0 && proof.AbsoluteErrorBound == 0 && proof.Basis == ErrorBasis.Structure);
        }
    }

    [Fact]
    public void Entries_rows_and_copies_agree()
    {
        // By hand: new → new → new 0.81; new → new → worn and new → worn → worn 0.09 + 0.075; new → worn → failed 0.025.
        var power = Pump.NStep(2);

        power["new", "new"].Should().BeApproximately(0.81, Tolerances.FourRoundings);
        power["new", "worn"].Should().BeApproximately(0.165, Tolerances.FourRoundings);
        power["new", "failed"].Should().BeApproximately(0.025, Tolerances.FourRoundings);
        power["failed", "failed"].Should().Be(0);
        power.Row("new").ToArray().Should().Equal(power.Values[..3].ToArray());
        power.Row("new").Steps.Should().Be(2);
        power.Row("new").Certificate.Should().Be(power.Certificate);
        power.ToArray()[0, 1].Should().Be(power["new", "worn"]);
        power.ToMatrix()[0, 1].Should().Be(power["new", "worn"]);
        power.States.Should().BeSameAs(Pump.States);
        power.Steps.Should().Be(2);
    }

    [Fact]
    public void Prints_a_small_table_the_same_in_every_culture()
    {
        using var culture = new CommaCulture();

        Pump.NStep(2).ToString().ReplaceLineEndings("\n").Should().Be("""
            2 steps
            from \ to   new    worn  failed
            new        0.81   0.165   0.025
            worn       0.25  0.5625  0.1875
            failed      0.9     0.1       ·
            """.ReplaceLineEndings("\n"));
        Dense(40).NStep(2).ToString().Should().Be("2 steps over " + Dense(40).States);
    }

    [Fact]
    public void Bad_questions_are_refused()
    {
        Pump.Invoking(chain => chain.NStep(-1)).Should().Throw<ArgumentOutOfRangeException>().WithMessage("*-1*0 or more*");
        Pump.Invoking(chain => chain.NStep(-1, new SquaringMethod())).Should().Throw<ArgumentOutOfRangeException>();
        Pump.Spectrum().Invoking(spectrum => spectrum.NStep(-1)).Should().Throw<ArgumentOutOfRangeException>();
        Pump.Spectrum().Invoking(spectrum => spectrum.NStep("new", -1)).Should().Throw<ArgumentOutOfRangeException>();
        Pump.NStep(2).Invoking(power => power["new", "dirty"]).Should().Throw<UnknownStateException>();
        Pump.NStep(2).Invoking(power => power.Row("dirty")).Should().Throw<UnknownStateException>();
        Pump.Spectrum().Invoking(spectrum => spectrum.NStep("dirty", 3)).Should().Throw<UnknownStateException>();
    }

    [Theory]
    [InlineData(2)]
    [InlineData(1_000_000)]
    public void A_large_sparse_chain_is_refused_with_the_size_and_never_filled_up(long steps)
    {
        const int states = 100_000;
        var ring = Chain.FromTransitions(Enumerable.Range(0, states).Select(state => new Transition<int>(state, (state + 1) % states, 1)));

        ring.Invoking(chain => chain.NStep(steps)).Should().Throw<MemoryLimitException>().WithMessage("*100,000*")
            .Which.RequiredBytes.Should().BeGreaterThanOrEqualTo(8L * states * states);
        ring.Invoking(chain => chain.NStep(1)).Should().Throw<MemoryLimitException>();
        ring.Invoking(chain => chain.Spectrum()).Should().Throw<MemoryLimitException>();
    }

    [Fact]
    public void Cancellation_is_honoured_by_every_method()
    {
        var cancelled = new SolveOptions { CancellationToken = new CancellationToken(true) };

        foreach (var method in new NStepMethod[] { new SquaringMethod(), new PropagationMethod(), new SpectralMethod() })
        {
            Pump.Invoking(chain => chain.NStep(9, method, cancelled)).Should().Throw<OperationCanceledException>();
        }
    }

    [Fact]
    public void Progress_ends_with_all()
    {
        foreach (var method in new NStepMethod[] { new SquaringMethod(), new PropagationMethod() })
        {
            var progress = new Reports();
            Pump.NStep(9, method, new SolveOptions { Progress = progress });

            progress.Fractions.Should().NotBeEmpty().And.BeInAscendingOrder();
            progress.Fractions[^1].Should().Be(1);
        }
    }

    [Theory]
    [InlineData(9)]
    [InlineData(130)]
    [InlineData(257)]
    public void Threads_do_not_change_a_bit(int states)
    {
        var chain = Dense(states);

        foreach (var method in new NStepMethod[] { new SquaringMethod(), new PropagationMethod(), new SpectralMethod() })
        {
            var one = chain.NStep(13, method, new SolveOptions { Parallelism = 1 });
            var three = chain.NStep(13, method, new SolveOptions { Parallelism = 3 });

            three.Values.SequenceEqual(one.Values).Should().BeTrue();
            three.Certificate.Should().Be(one.Certificate);
        }
    }

    [Theory]
    [InlineData(1)]
    [InlineData(7)]
    [InlineData(8)]
    [InlineData(129)]
    public void All_methods_and_instruction_sets_agree_within_their_bounds(int states)
    {
        var chain = Dense(states);
        var reference = chain.NStep(21, new PropagationMethod()).Require(relativeError: 1e-12);
        var methods = Enum.GetValues<InstructionSet>().Select(instructions => (NStepMethod)new SquaringMethod { Instructions = instructions })
            .Append(new SpectralMethod());

        foreach (var method in methods)
        {
            var power = chain.NStep(21, method);
            var allowed = power.Certificate.AbsoluteErrorBound + reference.Certificate.AbsoluteErrorBound;

            power.Certificate.IsProof.Should().BeTrue();
            power.Values.ToArray().Zip(reference.Values.ToArray(), (first, second) => Math.Abs(first - second)).Max().Should().BeLessThanOrEqualTo(allowed);
        }
    }

    [Fact]
    public void Either_storage_gives_the_same_power()
    {
        var chain = ChainFamilies.Named("random sparse").Create(30, 3).ToChain();

        chain.AsSparse().NStep(11, new SquaringMethod()).Values.SequenceEqual(chain.NStep(11, new SquaringMethod()).Values).Should().BeTrue();
    }

    [Fact]
    public void The_method_is_chosen_by_a_rule_that_the_certificate_tells()
    {
        var ring = Chain.FromTransitions(Enumerable.Range(0, 300).SelectMany(state => new[]
        {
            new Transition<int>(state, state, 0.5), new Transition<int>(state, (state + 1) % 300, 0.5),
        }));

        ring.NStep(3).Certificate.Method.Should().Be(new PropagationMethod().Name);
        ring.NStep(100_000).Certificate.Method.Should().Be(new SquaringMethod().Name);
        Pump.NStep(52).Certificate.Method.Should().Be(new SquaringMethod().Name);
        Pump.NStep(1_000_000).Certificate.Method.Should().Be(new SpectralMethod().Name);
        Pump.NStep(1_000_000).Certificate.RelativeErrorBound.Should().BeLessThan(1e-12);
        Pump.NStep(52, new PropagationMethod()).Certificate.Reason.Should().Be("As asked.");
    }

    [Fact]
    public void A_defective_chain_gets_squaring_and_insisting_on_the_spectrum_shows_the_loss()
    {
        // STRESS-DEFECTIVE, own making: a double eigenvalue −1/2 with one eigenvector.
        var chain = PublishedCases.Named("STRESS-DEFECTIVE").Queries[0].Chain().ToChain();

        chain.NStep(1_000_000).Certificate.Method.Should().Be(new SquaringMethod().Name);
        var insisted = chain.NStep(1_000_000, new SpectralMethod()).Certificate;
        insisted.RelativeErrorBound.Should().BeGreaterThan(1e-9);
        chain.Spectrum().IsDiagonalizable.Should().BeFalse();
    }

    [Fact]
    public void Without_proof_nothing_is_promised()
    {
        var none = Pump.NStep(9, new SolveOptions { CertificateLevel = CertificateLevel.None }).Certificate;
        var residual = Pump.NStep(9, new SolveOptions { CertificateLevel = CertificateLevel.Residual }).Certificate;

        none.Residual.Should().Be(double.PositiveInfinity);
        residual.Residual.Should().BeLessThanOrEqualTo(Tolerances.SumOfOne(3));
        foreach (var certificate in new[] { none, residual })
        {
            certificate.IsProof.Should().BeFalse();
            certificate.Basis.Should().Be(ErrorBasis.None);
            certificate.AbsoluteErrorBound.Should().Be(double.PositiveInfinity);
        }
    }

    private sealed class Reports : IProgress<SolveProgress>
    {
        internal List<double> Fractions { get; } = [];

        public void Report(SolveProgress value) => Fractions.Add(value.Fraction);
    }
}
