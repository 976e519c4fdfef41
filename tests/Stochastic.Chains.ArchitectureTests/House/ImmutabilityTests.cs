using System.Collections.Frozen;
using System.Collections.Immutable;
using System.Diagnostics;
using System.Diagnostics.Metrics;
using System.Reflection;
using System.Runtime.CompilerServices;

namespace Stochastic.Chains.ArchitectureTests.House;

public class ImmutabilityTests
{
    private const int FewestStaticFields = 20;
    private const int FewestProperties = 60;

    private static readonly Dictionary<string, string> OpenTypes = new()
    {
        ["Distribution"] = "results that are distributions derive from it and carry their certificate",
    };

    private static readonly HashSet<Type> ImmutableTypes =
    [
        typeof(string), typeof(decimal), typeof(Type), typeof(TimeSpan), typeof(ActivitySource), typeof(Meter), typeof(Counter<>), typeof(Histogram<>),
        typeof(FrozenSet<>), typeof(FrozenDictionary<,>), typeof(ImmutableArray<>), typeof(System.Buffers.SearchValues<>), typeof(EqualityComparer<>),
    ];

    [Fact]
    public void No_static_field_can_change_or_holds_what_can_change()
    {
        var fields = PublicSurface.Library.GetTypes()
            .Where(type => !type.FullName!.Contains('<', StringComparison.Ordinal) && !IsOfCoverage(type))
            .SelectMany(type => type.GetFields(PublicSurface.Everything))
            .Where(field => field.IsStatic && !field.Name.StartsWith("<>", StringComparison.Ordinal) && !field.Name.StartsWith("CS$", StringComparison.Ordinal))
            .ToList();

        fields.Count.Should().BeGreaterThan(FewestStaticFields);
        fields.Where(field => !IsFixed(field)).Select(field => $"{field.DeclaringType!.FullName}.{field.Name}: {field.FieldType}").Should().BeEmpty();
    }

    /// <summary>Measuring coverage plants a counter of its own into the library.</summary>
    private static bool IsOfCoverage(Type type) => type.FullName!.StartsWith("Coverlet.", StringComparison.Ordinal);

    [Fact]
    public void The_check_of_static_fields_finds_what_it_is_for()
    {
        typeof(Planted).GetFields(PublicSurface.Everything).Where(field => !IsFixed(field)).Select(field => field.Name)
            .Should().BeEquivalentTo("<Changing>k__BackingField", nameof(Planted.Table), nameof(Planted.Cache));
    }

    [Fact]
    public void Public_types_are_closed_to_derivation_but_for_those_listed()
    {
        PublicSurface.Types.Where(type => type.IsClass && !type.IsSealed && !type.IsAbstract).Select(PublicSurface.NameOf)
            .Should().BeEquivalentTo(OpenTypes.Keys);
    }

    [Fact]
    public void Public_properties_are_set_at_construction_or_never()
    {
        var properties = PublicSurface.Types.SelectMany(PublicSurface.Properties).ToList();

        properties.Count.Should().BeGreaterThan(FewestProperties);
        properties.Where(property => property.SetMethod is { } setter && PublicSurface.IsVisible(setter) && !IsInitOnly(setter))
            .Select(property => $"{property.DeclaringType!.Name}.{property.Name}").Should().BeEmpty();
    }

    [Fact]
    public void Public_types_have_no_fields_but_constants_and_enum_members()
    {
        PublicSurface.Types.SelectMany(type => type.GetFields(PublicSurface.Everything))
            .Where(field => (field.IsPublic || field.IsFamily || field.IsFamilyOrAssembly) && !field.IsLiteral && !field.IsSpecialName)
            .Select(field => $"{field.DeclaringType!.Name}.{field.Name}").Should().BeEmpty();
    }

    [Fact]
    public void Public_structs_are_readonly()
    {
        PublicSurface.Types.Where(type => type is { IsValueType: true, IsEnum: false } && !type.IsDefined(typeof(IsReadOnlyAttribute)))
            .Select(type => type.Name).Should().BeEmpty();
    }

    [Fact]
    public void Public_properties_hand_out_no_collection_that_can_be_written()
    {
        var writable = new[] { typeof(List<>), typeof(IList<>), typeof(Dictionary<,>), typeof(IDictionary<,>), typeof(HashSet<>), typeof(ISet<>), typeof(ICollection<>), typeof(Span<>) };

        PublicSurface.Types.SelectMany(PublicSurface.Properties)
            .Where(property => property.PropertyType.IsArray || (property.PropertyType.IsGenericType && writable.Contains(property.PropertyType.GetGenericTypeDefinition())))
            .Select(property => $"{property.DeclaringType!.Name}.{property.Name}").Should().BeEmpty();
    }

    private static bool IsFixed(FieldInfo field) => field.IsLiteral || (field.IsInitOnly && IsImmutable(field.FieldType));

    private static bool IsImmutable(Type type) =>
        type.IsPrimitive || type.IsEnum || type.IsGenericParameter
        || (Nullable.GetUnderlyingType(type) is { } underlying && IsImmutable(underlying))
        || ImmutableTypes.Contains(type) || (type.IsGenericType && ImmutableTypes.Contains(type.GetGenericTypeDefinition()))
        || (type.Assembly == PublicSurface.Library && HoldsNothingWritable(type));

    /// <summary>A type of the library whose own fields are all readonly and immutable, so that it can be shared.</summary>
    private static bool HoldsNothingWritable(Type type) =>
        type.GetFields(PublicSurface.Everything).Where(field => !field.IsStatic).All(field => field.IsInitOnly && (field.FieldType == type || IsImmutable(field.FieldType)));

    private static bool IsInitOnly(MethodInfo setter) => setter.ReturnParameter.GetRequiredCustomModifiers().Contains(typeof(IsExternalInit));

    private static class Planted
    {
        internal const int Constant = 1;
        internal static readonly string Word = string.Empty;
        internal static readonly double[] Table = [1];
        internal static readonly Dictionary<int, int> Cache = [];
        internal static int Changing { get; set; }
    }
}
