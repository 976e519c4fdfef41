using Stochastic.Chains.Tests.Support;
using Pair = (Stochastic.Chains.Tests.Support.PublishedNumber Published, double Computed);

namespace Stochastic.Chains.Tests.Published;

/// <summary>The library's answer to each kind of published question, beside the published one.</summary>
internal static class LibraryAnswers
{
    public static IReadOnlyDictionary<string, Func<PublishedQuery, IEnumerable<Pair>>> ByQuery { get; } =
        new Dictionary<string, Func<PublishedQuery, IEnumerable<Pair>>>
        {
            ["stationary"] = query => query.Vector().Zip(Selected(query, "states", Stationary(query))),
            ["restart_ranking"] = query => query.Vector().Zip(Stationary(query)),
            ["stationary_by_class"] = StationaryByClass,
            ["loss_probability"] = query => [(query.Scalar(), Stationary(query)[^1])],
            ["mean_recurrence"] = query => query.Vector().Zip(Selected(query, query.HasArgument("states") ? "states" : "state", MeanRecurrence(query))),
            ["mean_first_passage"] = MeanFirstPassage,
            ["kemeny_constant"] = query => [(query.Scalar(), query.Chain().ToChain().MeanFirstPassage().KemenyConstant)],
            ["commute_time"] = query => query.Vector().Zip([CommuteTime(query.Chain().ToChain().MeanFirstPassage(), query.States("pair"))]),
            ["hitting_mean"] = query => query.Vector().Zip(Selected(query, "start", Means(query, query.States("target")))),
            ["hitting_time_mean"] = query => query.Vector().Zip(Selected(query, "start", Means(query, query.States("target")))),
            ["mttf"] = query => query.Vector().Zip(Selected(query, "start", Means(query, [query.Chain().StateCount - 1]))),
            ["absorption_mean"] = query => query.Vector().Zip(Transient(query, query.Chain().ToChain().Absorption().MeanStepsValues.ToArray())),
            ["absorption_probabilities"] = query => Into(query, query.States("absorbing")),
            ["class_absorption_probability"] = query => Into(query, [.. query.StateLists("classes").Select(states => states[0])]),
            ["absorption_probability_top"] = query => query.Vector().Zip(Transient(query, Reaching(query, query.Chain().StateCount - 1))),
            ["first_probability"] = query => [(query.Scalar(), Reaching(query, query.Chain().StateCount - 2)[0])],
            ["ruin"] = Ruin,
            ["substochastic_radius"] = query => [(query.Scalar(), 1 - query.Chain().ToChain().QuasiStationary().DecayRate)],
            ["absorption_variance"] = query => query.Vector().Zip(Transient(query, Variances(query.Chain().ToChain().Absorption().Steps))),
            ["nstep_row"] = query => query.Vector().Zip(After(query, query.IntegerArgument("start"), Steps(query))),
            ["nstep_matrix"] = query => query.Matrix().SelectMany((row, start) => row.Zip(After(query, start, query.IntegerArgument("n")))),
            ["nstep_distribution"] = NStepDistribution,
            ["nstep_row_nonzeros"] = query => query.Matrix().Select(pair =>
                (pair[1], After(query, query.IntegerArgument("start"), query.IntegerArgument("n"))[(int)pair[0].Value.ToDouble()])),
            ["absorbed_by"] = query => query.Vector().Zip(query.States("n").Select(steps => After(query, 0, steps)[^1])),
            ["complete_by"] = query => query.Vector().Zip(query.States("steps").Select(steps => After(query, 0, steps)[^1])),
            ["total_variation"] = query => query.Vector().Zip(query.States("n").Select(steps => Distance(query, steps))),
        };

    private static double[] Stationary(PublishedQuery query) => query.Chain().ToChain().Stationary().ToArray();

    private static double[] MeanRecurrence(PublishedQuery query)
    {
        var perClass = query.Chain().ToChain().StationaryPerClass();
        return [.. Enumerable.Range(0, query.Chain().StateCount).Select(state => 1 / perClass.Max(shares => shares[state]))];
    }

    private static IEnumerable<Pair> StationaryByClass(PublishedQuery query)
    {
        var perClass = query.Chain().ToChain().StationaryPerClass();
        return query.Matrix().Zip(query.StateLists("classes")).SelectMany(pair =>
            pair.First.Zip(pair.Second.Select(state => perClass.Single(shares => shares[pair.Second[0]] > 0)[state])));
    }

    private static IEnumerable<Pair> MeanFirstPassage(PublishedQuery query)
    {
        var table = query.Chain().ToChain().MeanFirstPassage();
        return query.HasArgument("pairs")
            ? query.Vector().Zip(query.StateLists("pairs").Select(pair => table[pair[0], pair[1]]))
            : query.Matrix().SelectMany((row, from) => row.Zip(table.TimesFrom(from).Select(time => time.Mean)));
    }

    private static double CommuteTime(FirstPassageTable<int> table, int[] pair) => table[pair[0], pair[1]] + table[pair[1], pair[0]];

    private static double[] Means(PublishedQuery query, int[] targets) => query.Chain().ToChain().TimeToAny(targets).Values.ToArray();

    private static double[] Variances(HittingTimes<int> times) => [.. times.States.Select(times.Variance)];

    private static double[] Reaching(PublishedQuery query, int target) =>
        query.Chain().ToChain().TimeTo(target).ReachingProbabilities.ToArray();

    private static IEnumerable<Pair> Into(PublishedQuery query, int[] ends)
    {
        var absorption = query.Chain().ToChain().Absorption();
        return query.Matrix().Zip(query.States("transient")).SelectMany(row => row.First.Zip(ends.Select(end => absorption.Probability(row.Second, end))));
    }

    private static IEnumerable<Pair> Ruin(PublishedQuery query)
    {
        var (start, top) = (query.IntegerArgument("z"), query.IntegerArgument("a"));
        var absorption = query.Chain().ToChain().Absorption();
        return
        [
            (query.Member("ruin"), absorption.Probability(start, 0)),
            (query.Member("success"), absorption.Probability(start, top)),
            (query.Member("duration"), absorption.MeanSteps(start)),
        ];
    }

    private static IEnumerable<Pair> NStepDistribution(PublishedQuery query)
    {
        var chain = query.Chain().ToChain();
        var initial = query.Arguments.GetProperty("initial").EnumerateArray().Select((item, state) => (state, Rational.Parse(item.GetString()!).ToDouble()));
        return query.Vector().Zip(chain.StartingIn(Distribution.FromWeights(chain.States, initial)).After(Steps(query)).ToArray());
    }

    /// <summary>Steps of the published step matrix; for a chain in continuous time that is its given uniformization.</summary>
    private static double[] After(PublishedQuery query, int start, int steps) => query.Chain().ToStepChain().StartingIn(start).After(steps).ToArray();

    private static double Distance(PublishedQuery query, int steps)
    {
        var chain = query.Chain().ToChain();
        return chain.StartingIn(query.IntegerArgument("start")).After(steps).TotalVariation(chain.Stationary());
    }

    private static int Steps(PublishedQuery query) => query.IntegerArgument(query.HasArgument("steps") ? "steps" : "n");

    private static IEnumerable<double> Selected(PublishedQuery query, string argument, double[] all) =>
        query.HasArgument(argument) ? query.States(argument).Select(state => all[state]) : all;

    /// <summary>The listed transient states, or the start where the answer is a single number.</summary>
    private static IEnumerable<double> Transient(PublishedQuery query, double[] all) =>
        query.HasArgument("transient") ? query.States("transient").Select(state => all[state]) : [all[0]];
}
