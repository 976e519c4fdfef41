namespace Stochastic.Chains.Benchmarks;

/// <summary>Invented large chains and observations, the same in every run. Moves come row by row.</summary>
internal static class InventedChains
{
    private const int Seed = 20_250_106;
    private const int Moves = 10;

    /// <summary>Ten moves of random probability: to the next state, to four more near it, and to five anywhere.</summary>
    internal static Transition<int>[] HalfNear(int states) => TenEach(states, near: 5);

    /// <summary>Ten moves of random probability to the next state and to others near it.</summary>
    internal static Transition<int>[] AllNear(int states) => TenEach(states, near: Moves);

    /// <summary>Groups of states that mix fast, each a cycle with four more moves out of each state, and rare moves from group to group.</summary>
    internal static Transition<int>[] Groups(int groups, int members, double coupling)
    {
        var random = new Random(Seed);
        List<Transition<int>> all = [];
        for (var from = 0; from < groups * members; from++)
        {
            var first = from / members * members;
            HashSet<int> to = [first + ((from + 1 - first) % members)];
            while (to.Count < Moves / 2)
            {
                to.Add(first + random.Next(members));
            }

            var leaves = from % members == 0 || random.Next(members / 10) == 0;
            var weights = to.Select(target => (To: target, Weight: random.NextDouble() + 0.1)).ToList();
            if (leaves)
            {
                weights.Add((((from / members + 1) % groups * members) + random.Next(members), coupling * (random.NextDouble() + 0.1)));
            }

            AddRow(all, from, weights);
        }

        return [.. all];
    }

    /// <summary>Two queues in line with room for so many each: arrivals at the first, which passes on to the second, which lets go.</summary>
    internal static Transition<int>[] TwoQueues(int room)
    {
        const double Arrival = 0.25;
        const double First = 0.3;
        const double Second = 0.35;
        List<Transition<int>> all = [];
        for (var from = 0; from < room * room; from++)
        {
            var (one, two) = (from / room, from % room);
            List<(int To, double Probability)> moves =
            [
                .. If(one < room - 1, from + room, Arrival),
                .. If(one > 0 && two < room - 1, from - room + 1, First),
                .. If(two > 0, from - 1, Second),
            ];
            moves.Add((from, 1 - moves.Sum(move => move.Probability)));
            all.AddRange(moves.Select(move => new Transition<int>(from, move.To, move.Probability)));
        }

        return [.. all];

        static (int, double)[] If(bool possible, int to, double probability) => possible ? [(to, probability)] : [];
    }

    /// <summary>One long path that visits every state.</summary>
    internal static int[] Path(int events, int states)
    {
        var random = new Random(Seed);
        return [.. Enumerable.Range(0, events).Select(k => k < states ? k : random.Next(states))];
    }

    /// <summary>What one would write without a library, knowing the number of states.</summary>
    internal static long[,] CountByHand(int[] path, int states)
    {
        var counts = new long[states, states];
        for (var k = 1; k < path.Length; k++)
        {
            counts[path[k - 1], path[k]]++;
        }

        return counts;
    }

    private static Transition<int>[] TenEach(int states, int near)
    {
        var random = new Random(Seed);
        List<Transition<int>> all = new(states * Moves);
        List<(int To, double Weight)> row = new(Moves);
        for (var from = 0; from < states; from++)
        {
            row.Clear();
            while (row.Count < Moves)
            {
                var distance = row.Count < near ? row.Count + 1 : random.Next(Moves + 1, states);
                var to = (from + distance) % states;
                if (!row.Exists(move => move.To == to))
                {
                    row.Add((to, random.NextDouble() + 0.1));
                }
            }

            AddRow(all, from, row);
        }

        return [.. all];
    }

    private static void AddRow(List<Transition<int>> all, int from, List<(int To, double Weight)> row)
    {
        var sum = row.Sum(move => move.Weight);
        all.AddRange(row.Select(move => new Transition<int>(from, move.To, move.Weight / sum)));
    }
}
