using System.Runtime.InteropServices;

namespace Stochastic.Chains.Estimation;

/// <summary>
/// Records, while moves are counted along one path after another, what moves alone do not tell: which three states followed each other, and how long
/// an item had been in a state when it stayed or left. Takes memory for what is seen, never for the paths.
/// </summary>
internal sealed class PathRecorder
{
    private readonly Dictionary<(int Earlier, int From, int To), long> _triples = [];
    private readonly Dictionary<int, StayCounts> _stays = [];
    private int _earlier = -1;
    private int _current = -1;
    private long _age;

    internal IReadOnlyDictionary<(int Earlier, int From, int To), long> Triples => _triples;

    internal IReadOnlyDictionary<int, StayCounts> Stays => _stays;

    internal void StartPath() => (_earlier, _current, _age) = (-1, -1, 0);

    /// <summary>A move of the path, or the same stay many times.</summary>
    internal void Add(int from, int to, long count)
    {
        if (count == 0)
        {
            return;
        }

        if (from != _current)
        {
            (_earlier, _age) = (-1, 1);
        }

        if (_earlier >= 0)
        {
            AddTriple(_earlier, from, to, 1);
        }

        if (count > 1)
        {
            AddTriple(from, from, to, count - 1); // only stays are added many at a time
        }

        if (!_stays.TryGetValue(from, out var stays))
        {
            _stays[from] = stays = new StayCounts();
        }

        if (from == to)
        {
            stays.AddStays(_age, count);
            _age += count;
        }
        else
        {
            stays.AddLeave(_age);
            _age = 1;
        }

        (_earlier, _current) = (from, to);
    }

    internal void AddAll(PathRecorder other)
    {
        foreach (var ((earlier, from, to), count) in other._triples)
        {
            AddTriple(earlier, from, to, count);
        }

        foreach (var (state, others) in other._stays)
        {
            if (!_stays.TryGetValue(state, out var stays))
            {
                _stays[state] = stays = new StayCounts();
            }

            stays.AddAll(others);
        }
    }

    private void AddTriple(int earlier, int from, int to, long count)
    {
        ref var cell = ref CollectionsMarshal.GetValueRefOrAddDefault(_triples, (earlier, from, to), out _);
        cell = checked(cell + count);
    }
}
