using System.Reflection;

namespace Stochastic.Chains.ArchitectureTests.House;

public class SignatureTests
{
    private const int FewestMembers = 80;

    [Fact]
    public void With_whole_numbers_as_states_no_two_members_take_the_same_arguments()
    {
        var members = PublicSurface.Types.SelectMany(Callables).ToList();

        members.Count.Should().BeGreaterThan(FewestMembers);
        Clashes(PublicSurface.Types).Should().BeEmpty("a state and an index must never be told apart by the compiler's choice of overload");
    }

    [Fact]
    public void The_check_of_overloads_finds_an_index_beside_a_state()
    {
        Clashes([typeof(Planted<>), typeof(PlantedExtensions)]).Should().BeEquivalentTo(
            "Planted.Item(Int32)", "Planted.Share(Int32)", "PlantedExtensions.Pick(Planted<Int32>, IEnumerable<Int32>)");
    }

    [Fact]
    public void No_public_member_has_optional_parameters()
    {
        PublicSurface.Types.SelectMany(Callables).SelectMany(member => member.Parameters.Where(parameter => parameter.IsOptional))
            .Select(parameter => $"{parameter.Member.DeclaringType!.Name}.{parameter.Member.Name}: {parameter.Name}").Should().BeEmpty();
    }

    private static IEnumerable<string> Clashes(IEnumerable<Type> types) =>
        from type in types
        from same in Callables(type).GroupBy(member => $"{member.Name}({string.Join(", ", member.Parameters.Select(parameter => WithIntStates(parameter.ParameterType)))})")
        where same.Count() > 1
        select $"{PublicSurface.NameOf(type)}.{same.Key}";

    private static IEnumerable<(string Name, ParameterInfo[] Parameters)> Callables(Type type) =>
    [
        .. PublicSurface.Methods(type).Select(method => (method.Name, method.GetParameters())),
        .. PublicSurface.Properties(type).Where(property => property.GetIndexParameters().Length > 0).Select(property => (property.Name, property.GetIndexParameters())),
        .. PublicSurface.Constructors(type).Select(constructor => (constructor.Name, constructor.GetParameters())),
    ];

    /// <summary>The type as it reads when every type parameter is int.</summary>
    private static string WithIntStates(Type type)
    {
        if (type.IsGenericParameter)
        {
            return nameof(Int32);
        }

        return type.HasElementType ? WithIntStates(type.GetElementType()!) + type.Name[^(type.IsArray ? 2 : 1)..]
            : type.IsGenericType ? $"{PublicSurface.NameOf(type)}<{string.Join(", ", type.GetGenericArguments().Select(WithIntStates))}>"
            : type.Name;
    }
}

/// <summary>Holds what the rule forbids.</summary>
public sealed class Planted<TState>
    where TState : notnull
{
    /// <summary>By state.</summary>
    public double this[TState state] => 0;

    /// <summary>By index.</summary>
    public double this[int index] => index;

    /// <summary>By state.</summary>
    public double Share(TState state) => 0;

    /// <summary>By index.</summary>
    public double Share(int index) => index;

    /// <summary>By two states, which is another thing.</summary>
    public double Share(TState from, TState to) => 0;
}

/// <summary>Holds what the rule forbids, as extension methods.</summary>
public static class PlantedExtensions
{
    /// <summary>By states.</summary>
    public static double Pick<TState>(this Planted<TState> planted, IEnumerable<TState> states)
        where TState : notnull => 0;

    /// <summary>By indices.</summary>
    public static double Pick<TState>(this Planted<TState> planted, IEnumerable<int> indices)
        where TState : notnull => 0;
}
