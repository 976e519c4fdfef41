using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Stationary;

/// <summary>Certificates of chains beyond the reach of exact fractions, just over the edges of blocks, against twice the digits.</summary>
public class LargeCertificateTests
{
    private static readonly string[] Families =
        ["random dense", "random sparse", "periodic", "nearly decomposable", "nested decomposable", "graded", "rare target", "reflecting path"];

    public static TheoryData<string, int> FamiliesAndSizes
    {
        get
        {
            var data = new TheoryData<string, int>();
            foreach (var family in Families)
            {
                data.Add(family, 129);
                data.Add(family, 257);
            }

            return data;
        }
    }

    [Theory]
    [MemberData(nameof(FamiliesAndSizes))]
    public void No_method_is_off_by_more_than_its_proof_and_the_proof_is_useful(string family, int size)
    {
        var sample = ChainFamilies.Named(family).Create(size, seed: (ulong)size);
        var exact = new DoubleDoubleChain(sample.Matrix).Stationary();
        var chain = sample.ToChain();
        foreach (var method in StationaryMethods.All)
        {
            if (!method.TryAnswer(chain, out var shares))
            {
                method.Should().NotBeOfType<EliminationMethod>("it cannot lose a sign");
                continue;
            }

            var error = shares.ToArray().Zip(exact, (computed, truth) => truth.RelativeDifference(computed)).Max();
            var bound = shares.Certificate.RelativeErrorBound;
            error.Should().BeLessThanOrEqualTo(bound, "{0} by {1}", sample, method.Name);
            shares.ToArray().Zip(exact, (computed, truth) => truth.RelativeDifference(computed) * truth.ToDouble()).Max()
                .Should().BeLessThanOrEqualTo(shares.Certificate.AbsoluteErrorBound, "{0} by {1}", sample, method.Name);
            bound.Should().BeLessThanOrEqualTo(
                method is EliminationMethod ? Tolerances.FourRoundings : UsefulBound.For(family, error), "{0} by {1}, off by {2}", sample, method.Name, error);
        }
    }

    /// <summary>The kept state is exchanged for one with a large share; refinement does not get anywhere with a rare one.</summary>
    [Fact]
    public void A_rare_last_state_does_not_keep_a_large_chain_from_being_refined()
    {
        const int States = 520;
        const double Rarity = 1e-30;
        var matrix = ChainFamilies.Named("random dense").Create(States, seed: 1).Matrix;
        for (var from = 0; from < States - 1; from++)
        {
            matrix[from, from] += matrix[from, States - 1];
            matrix[from, States - 1] = Rarity;
        }

        var shares = Chain.FromMatrix(matrix).Stationary();

        shares.Certificate.Basis.Should().Be(ErrorBasis.RefinedMonotone);
        shares.Certificate.RelativeErrorBound.Should().BeLessThanOrEqualTo(Tolerances.FourRoundings);
    }

    [Fact]
    public void A_large_chain_that_cannot_be_refined_is_eliminated_in_twice_the_precision_on_request()
    {
        const int States = 520;
        var chain = ChainFamilies.Named("nearly decomposable").Create(States, seed: 3).ToChain();

        var unasked = chain.Stationary().Certificate;
        var asked = chain.Stationary(new EliminationMethod { MaxDoubledStates = States }).Certificate;

        unasked.IsProof.Should().BeTrue();
        unasked.RelativeErrorBound.Should().BeGreaterThan(Tolerances.FourRoundings);
        asked.Basis.Should().Be(ErrorBasis.DoubledElimination);
        asked.RelativeErrorBound.Should().BeLessThanOrEqualTo(Tolerances.FourRoundings);
    }
}
