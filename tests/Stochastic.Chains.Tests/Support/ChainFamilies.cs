namespace Stochastic.Chains.Tests.Support;

/// <summary>The families of hard chains that every method is swept over.</summary>
internal static class ChainFamilies
{
    private const int Unlimited = int.MaxValue;

    public static IReadOnlyList<ChainFamily> All { get; } =
    [
        new("random dense", 2, Unlimited, IsIrreducible: true, HasTarget: false, RandomFamilies.Dense),
        new("random sparse", 2, Unlimited, IsIrreducible: true, HasTarget: false, RandomFamilies.Sparse),
        new("periodic", 2, Unlimited, IsIrreducible: true, HasTarget: false, RandomFamilies.Periodic),
        new("nearly decomposable", 2, Unlimited, IsIrreducible: true, HasTarget: false, GradedFamilies.NearlyDecomposable),
        new("nested decomposable", 2, Unlimited, IsIrreducible: true, HasTarget: false, GradedFamilies.NestedDecomposable),
        new("graded", 2, Unlimited, IsIrreducible: true, HasTarget: false, GradedFamilies.Graded),
        new("birth-death", 2, Unlimited, IsIrreducible: true, HasTarget: false, GradedFamilies.BirthDeath),
        new("rare target", 2, Unlimited, IsIrreducible: true, HasTarget: true, GradedFamilies.RareTarget),
        new("near absorbing", 2, Unlimited, IsIrreducible: true, HasTarget: true, GradedFamilies.NearAbsorbing),
        new("two states", 2, 2, IsIrreducible: true, HasTarget: false, GradedFamilies.TwoStates),
        new("reflecting path", 2, Unlimited, IsIrreducible: true, HasTarget: false, StructuredFamilies.ReflectingPath),
        new("defective", 3, Unlimited, IsIrreducible: true, HasTarget: false, StructuredFamilies.Defective),
        new("one state", 1, 1, IsIrreducible: true, HasTarget: false, StructuredFamilies.Identity),
        new("reducible", 4, Unlimited, IsIrreducible: false, HasTarget: false, ReducibleFamilies.SeveralClasses),
        new("rare absorption", 4, Unlimited, IsIrreducible: false, HasTarget: false, ReducibleFamilies.RareAbsorption),
        new("absorbing path", 2, Unlimited, IsIrreducible: false, HasTarget: true, ReducibleFamilies.AbsorbingPath),
        new("permutation", 1, Unlimited, IsIrreducible: false, HasTarget: false, StructuredFamilies.Permutation),
        new("identity", 2, Unlimited, IsIrreducible: false, HasTarget: false, StructuredFamilies.Identity),
    ];

    public static IEnumerable<ChainFamily> Irreducible => All.Where(family => family.IsIrreducible);

    public static ChainFamily Named(string name) => All.Single(family => family.Name == name);
}
