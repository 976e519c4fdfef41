using System.Text.Json;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.SupportTests;

public class ReferenceStructureTests
{
    public static TheoryData<string> CasesWithClasses => [.. PublishedCases.Queries("classes").Select(query => query.Case.Id)];

    [Theory]
    [MemberData(nameof(CasesWithClasses))]
    public void Classes_are_the_published_ones(string id)
    {
        var query = PublishedCases.Queries("classes").Single(candidate => candidate.Case.Id == id);
        var structure = query.Chain().ToExact().Structure;

        structure.Classes.Should().HaveCount(query.Values.GetArrayLength());
        foreach (var (found, expected) in structure.Classes.Zip(query.Values.EnumerateArray()))
        {
            var states = expected.GetProperty("states");
            found.States.Should().Equal(
                states.ValueKind == JsonValueKind.Array
                    ? states.EnumerateArray().Select(item => item.GetInt32())
                    : Enumerable.Range(0, 64),
                query.ToString());
            found.IsClosed.Should().Be(expected.GetProperty("closed").GetBoolean());
            found.Period.Should().Be(expected.GetProperty("period").GetInt32());
        }
    }

    [Fact]
    public void Cyclic_classes_are_the_published_ones()
    {
        var queries = PublishedCases.Queries("cyclic_classes").ToArray();
        foreach (var query in queries)
        {
            var structure = query.Chain().ToExact().Structure;
            structure.CyclicClasses(structure.Classes[0]).Should().BeEquivalentTo(
                query.Values.EnumerateArray().Select(list => list.EnumerateArray().Select(item => item.GetInt32()).ToArray()),
                options => options.WithStrictOrdering(),
                query.ToString());
        }

        queries.Should().HaveCountGreaterThanOrEqualTo(2);
    }

    [Fact]
    public void Cyclic_order_is_the_published_one()
    {
        var query = PublishedCases.Queries("cyclic_class_of").Single();
        var structure = query.Chain().ToExact().Structure;
        var cyclic = structure.CyclicClasses(structure.Classes[0]);

        Enumerable.Range(0, 12).Select(state => Array.FindIndex(cyclic, states => states.Contains(state)))
            .Should().Equal(query.Values.EnumerateArray().Select(item => item.GetInt32()));
    }

    [Fact]
    public void A_bishop_lives_on_one_color()
    {
        var query = PublishedCases.Queries("class_count").Single();

        query.Chain().ToExact().Structure.Classes.Should().HaveCount(query.Values[0].GetInt32());
    }

    [Fact]
    public void Period_is_the_greatest_common_divisor_of_return_times()
    {
        foreach (var family in ChainFamilies.All)
        {
            foreach (var sample in family.Samples(20, 8))
            {
                var structure = sample.ToExact().Structure;
                for (var state = 0; state < sample.StateCount; state++)
                {
                    structure.Classes[structure.ClassOf[state]].Period.Should().Be(GcdOfReturnTimes(sample, state), "{0}", sample);
                }
            }
        }
    }

    /// <summary>Over return times up to 3n², which is more than enough for the divisor to settle.</summary>
    private static int GcdOfReturnTimes(SampleChain sample, int state)
    {
        var divisor = 0;
        HashSet<int> now = [state];
        var moves = sample.Transitions.ToLookup(move => move.From, move => move.To);
        for (var time = 1; time <= 3 * sample.StateCount * sample.StateCount; time++)
        {
            now = [.. now.SelectMany(from => moves[from])];
            divisor = now.Contains(state) ? (int)System.Numerics.BigInteger.GreatestCommonDivisor(divisor, time) : divisor;
        }

        return divisor;
    }
}
