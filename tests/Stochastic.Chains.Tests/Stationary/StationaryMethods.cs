using System.Diagnostics.CodeAnalysis;

namespace Stochastic.Chains.Tests.Stationary;

/// <summary>The methods that the sweeps run: all built-in ones, with caps that keep hopeless iterations short, and one written by a user.</summary>
internal static class StationaryMethods
{
    internal static IReadOnlyList<IStationaryMethod> All { get; } =
    [
        new EliminationMethod(),
        new LinearSystemMethod(),
        new EigenMethod(),
        new PowerMethod { MaxIterations = 2000 },
        new GaussSeidelMethod { MaxIterations = 500 },
        new AggregationMethod { MaxIterations = 100 },
        new PolishedMethod(new PowerMethod { MaxIterations = 2000 }),
        new PlainReduction(),
    ];

    public static TheoryData<string> Names => [.. All.Select(method => method.Name)];

    internal static IStationaryMethod Named(string name) => All.Single(method => method.Name == name);

    /// <summary>
    /// What the method reaches, converged or not, with its certificate; false where it refuses because a share came out as nothing or
    /// negative, or leaves the range of a double.
    /// </summary>
    internal static bool TryAnswer(this IStationaryMethod method, Chain<int> chain, [NotNullWhen(true)] out StationaryDistribution<int>? shares)
    {
        try
        {
            chain.TryStationary(method, new SolveOptions(), out shares);
            return true;
        }
        catch (NumericalRangeException refused)
        {
            refused.Message.Should().Contain("long-run share");
            shares = null;
            return false;
        }
    }
}
