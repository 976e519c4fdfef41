using System.Text.Json.Serialization;

namespace Stochastic.Chains.Benchmarks.Accuracy;

/// <summary>What a claimed bound is on.</summary>
[JsonConverter(typeof(JsonStringEnumConverter<BoundKind>))]
internal enum BoundKind
{
    /// <summary>Nothing was claimed.</summary>
    None,

    /// <summary>On absolute errors of entries.</summary>
    Absolute,

    /// <summary>On relative errors of entries.</summary>
    Relative,
}
