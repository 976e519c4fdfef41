using System.Numerics;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Tests.Kernels;

public class SquaringChainTests
{
    public static TheoryData<long> Exponents => [.. Enumerable.Range(1, 200).Select(exponent => (long)exponent), 1000, 65535, 65536, 65537, 1_000_000_000, long.MaxValue];

    [Theory]
    [MemberData(nameof(Exponents))]
    public void A_chain_makes_its_exponent_with_no_more_products_than_its_binary_digits_ask_for(long exponent)
    {
        var chain = SquaringChain.For(exponent);
        var powers = new List<long> { 1 };
        foreach (var (left, right) in chain.Products)
        {
            powers.Add(powers[left] + powers[right]);
        }

        powers[^1].Should().Be(exponent);
        chain.Products.Should().HaveCountLessThanOrEqualTo(BitOperations.Log2((ulong)exponent) + BitOperations.PopCount((ulong)exponent) - 1);
        chain.LastUses.Should().HaveCount(powers.Count);
        chain.LargestHeld().Should().BeInRange(1, 8);
    }

    [Theory]
    [InlineData(15, 5)]
    [InlineData(23, 7)]
    [InlineData(33, 6)]
    [InlineData(1000, 12)]
    public void Lengths_are_those_of_the_factor_method(long exponent, int products)
    {
        // Knuth, The Art of Computer Programming, vol. 2, 3rd ed. 1997, section 4.6.3: 15 takes five by factors and six by digits.
        SquaringChain.For(exponent).Products.Should().HaveCount(products);
    }
}
