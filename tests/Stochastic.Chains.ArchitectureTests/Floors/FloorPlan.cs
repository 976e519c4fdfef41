namespace Stochastic.Chains.ArchitectureTests.Floors;

/// <summary>The folders of the library and their floors: a folder uses lower floors only, and never another folder of its own floor.</summary>
internal static class FloorPlan
{
    internal static IReadOnlyDictionary<string, int> Floors { get; } = new Dictionary<string, int>
    {
        ["Internal"] = 0,
        ["Kernels"] = 1,
        ["Evidence"] = 2,
        ["Model"] = 3,
        ["Structure"] = 4,
        ["Stationary"] = 5,
        ["Passage"] = 5,
        ["Steps"] = 5,
        ["LongRun"] = 6,
        ["Rewards"] = 6,
        ["Sensitivity"] = 6,
        ["Estimation"] = 6,
        ["Simulation"] = 6,
        ["Confidence"] = 7,
        ["Interchange"] = 8,
    };

    internal static bool MayUse(string user, string used) => user == used || Floors[used] < Floors[user];
}
