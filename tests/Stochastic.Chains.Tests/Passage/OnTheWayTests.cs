using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Passage;

/// <summary>Visits and conditional times against exact arithmetic.</summary>
public class OnTheWayTests
{
    private const int ChainsPerFamily = 20;
    private const int LargestSize = 8;

    public static TheoryData<string> Families => [.. ChainFamilies.All.Select(family => family.Name)];

    [Theory]
    [MemberData(nameof(Families))]
    public void No_visit_and_no_conditional_time_is_off_by_more_than_its_bound(string name)
    {
        foreach (var sample in ChainFamilies.Named(name).Samples(ChainsPerFamily, LargestSize))
        {
            var target = sample.Target ?? (int)(sample.Seed % (ulong)sample.StateCount);
            var times = sample.ToChain().TimeTo(target);
            var reaching = sample.ToExact().ReachingProbability(target);
            int[] members = [.. Enumerable.Range(0, sample.StateCount).Where(state => state != target && reaching[state].Sign > 0)];
            var inverse = RationalSystem.Inverse(sample, members);
            var weighted = RationalSystem.Multiply(inverse, [.. members.Select(member => reaching[member])]);
            var conditional = times.IfReached();
            for (var k = 0; k < members.Length; k++)
            {
                Check(weighted[k] / reaching[members[k]], conditional.Mean(members[k]), conditional.Certificate, sample);
                if (IsRefused(inverse, [k], () => times.VisitsFrom(members[k])))
                {
                    continue;
                }

                var visits = times.VisitsFrom(members[k]);
                for (var j = 0; j < members.Length; j++)
                {
                    Check(inverse[k, j], visits[members[j]], visits.Certificate, sample);
                }
            }
        }
    }

    [Theory]
    [MemberData(nameof(Families))]
    public void No_entry_of_the_fundamental_matrix_is_off_by_more_than_its_bound(string name)
    {
        foreach (var sample in ChainFamilies.Named(name).Samples(ChainsPerFamily, LargestSize))
        {
            var absorption = sample.ToChain().Absorption();
            int[] members = [.. sample.ToChain().Structure().TransientStates];
            var inverse = RationalSystem.Inverse(sample, members);
            if (IsRefused(inverse, [.. Enumerable.Range(0, members.Length)], () => absorption.FundamentalMatrix()))
            {
                continue;
            }

            var table = absorption.FundamentalMatrix();
            table.TransientStates.Should().Equal(members);
            for (var k = 0; k < members.Length; k++)
            {
                for (var j = 0; j < members.Length; j++)
                {
                    absorption.ExpectedVisits(members[k], members[j]).Should().Be(table[members[k], members[j]]);
                    Check(inverse[k, j], table[members[k], members[j]], table.Certificate, sample);
                }
            }
        }
    }

    [Theory]
    [InlineData("reducible")]
    [InlineData("rare absorption")]
    public void No_conditional_time_of_an_end_is_off_by_more_than_its_bound(string name)
    {
        foreach (var sample in ChainFamilies.Named(name).Samples(ChainsPerFamily, LargestSize))
        {
            var absorption = sample.ToChain().Absorption();
            var exact = sample.ToExact();
            var probabilities = exact.AbsorptionProbabilities();
            for (var end = 0; end < absorption.Ends.Count; end++)
            {
                var into = exact.Structure.RecurrentClasses[end].States[0];
                var transient = Enumerable.Range(0, sample.StateCount).Except(exact.Structure.RecurrentClasses.SelectMany(group => group.States));
                int[] members = [.. transient.Where(state => probabilities[state, end].Sign > 0)];
                var weighted = RationalSystem.Multiply(RationalSystem.Inverse(sample, members), [.. members.Select(member => probabilities[member, end])]);
                var times = absorption.StepsIfInto(into);
                for (var k = 0; k < members.Length; k++)
                {
                    Check(weighted[k] / probabilities[members[k], end], times.Mean(members[k]), times.Certificate, sample);
                }
            }
        }
    }

    /// <summary>Whether some figure of a row is outside what a double can hold; the question is then refused by name.</summary>
    private static bool IsRefused(Rational[,] inverse, int[] rows, Action ask)
    {
        var isOutside = rows.Any(row => Enumerable.Range(0, inverse.GetLength(1)).Any(column => inverse[row, column] is { Sign: > 0 } figure && !double.IsNormal(figure.ToDouble())));
        if (isOutside)
        {
            ask.Should().Throw<NumericalRangeException>().WithMessage("The mean number of visits to*");
        }

        return isOutside;
    }

    private static void Check(Rational exact, double computed, Certificate certificate, SampleChain sample)
    {
        certificate.IsProof.Should().BeTrue(sample.ToString());
        exact.RelativeDifference(computed).Should().BeLessThanOrEqualTo(certificate.RelativeErrorBound, sample.ToString());
    }
}
