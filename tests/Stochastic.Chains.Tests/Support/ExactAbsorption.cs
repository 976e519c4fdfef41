namespace Stochastic.Chains.Tests.Support;

/// <summary>What happens to a chain that starts in a transient state.</summary>
internal sealed partial class ExactChain
{
    /// <summary>[state, k]: the probability of ending in recurrent class k, in the order of the structure's recurrent classes.</summary>
    public Rational[,] AbsorptionProbabilities()
    {
        var result = new Rational[StateCount, Structure.RecurrentClasses.Count];
        for (var k = 0; k < Structure.RecurrentClasses.Count; k++)
        {
            var probabilities = ReachingProbability(Structure.RecurrentClasses[k].States);
            for (var state = 0; state < StateCount; state++)
            {
                result[state, k] = probabilities[state];
            }
        }

        return result;
    }

    /// <summary>Mean steps before a recurrent state is entered; 0 in a recurrent state. Always finite.</summary>
    public Rational[] AbsorptionMean() => Array.ConvertAll(HittingMean(RecurrentStates()), mean => mean!.Value);

    /// <summary>The variance of the same number of steps.</summary>
    public Rational[] AbsorptionVariance() => Array.ConvertAll(HittingVariance(RecurrentStates()), variance => variance!.Value);

    private int[] RecurrentStates() => [.. Structure.RecurrentClasses.SelectMany(c => c.States)];
}
