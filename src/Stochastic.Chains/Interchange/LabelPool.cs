namespace Stochastic.Chains.Interchange;

/// <summary>Gives one string for each of the first many different texts, so that a long file makes few strings.</summary>
internal sealed class LabelPool
{
    private const int Capacity = 1 << 16;

    private readonly HashSet<string> _labels = new(StringComparer.Ordinal);
    private readonly HashSet<string>.AlternateLookup<ReadOnlySpan<char>> _bySpan;

    internal LabelPool() => _bySpan = _labels.GetAlternateLookup<ReadOnlySpan<char>>();

    internal string Get(ReadOnlySpan<char> text)
    {
        if (_bySpan.TryGetValue(text, out var known))
        {
            return known;
        }

        var label = text.ToString();
        if (_labels.Count < Capacity)
        {
            _labels.Add(label);
        }

        return label;
    }
}
