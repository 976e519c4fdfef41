using Stochastic.Chains.Kernels;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Kernels;

public class PatternPowerTests
{
    [Theory]
    [InlineData(1)]
    [InlineData(5)]
    [InlineData(64)]
    [InlineData(65)]
    [InlineData(130)]
    public void A_power_holds_the_ends_of_all_walks_of_that_length(int states)
    {
        var sample = ChainFamilies.Named("random sparse").Create(states, 2);
        var size = sample.StateCount;
        var pattern = PatternPower.Of(EigenCases.Table(size, (row, column) => sample.Matrix[row, column]), size);
        foreach (var steps in new[] { 1, 2, 5, 12 })
        {
            var power = pattern.Raise(steps, CancellationToken.None);
            var reached = new HashSet<int> { 0 };
            for (var step = 0; step < steps; step++)
            {
                reached = [.. reached.SelectMany(from => Enumerable.Range(0, size).Where(to => sample.Matrix[from, to] > 0))];
            }

            Enumerable.Range(0, size).Where(to => power[0, to]).Should().BeEquivalentTo(reached);
        }
    }
}
