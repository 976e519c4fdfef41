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
            ["cyclic_class_of"] = CyclicClassOf,
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
            ["variance_first_passage"] = VarianceFirstPassage,
            ["lump"] = Lump,
            ["censored_chain"] = query => Entries(query, query.Chain().ToChain().Censor(query.States("states"))),
            ["substochastic_radius"] = query => [(query.Scalar(), 1 - query.Chain().ToChain().QuasiStationary().DecayRate)],
            ["absorption_variance"] = query => query.Vector().Zip(Transient(query, Variances(query.Chain().ToChain().Absorption().Steps))),
            ["nstep_row"] = query => query.Vector().Zip(After(query, query.IntegerArgument("start"), Steps(query))),
            ["nstep_matrix"] = query => query.Matrix().SelectMany((row, start) => row.Zip(NStep(query).Row(start).ToArray())),
            ["eigenvalues"] = query => query.Vector().OrderBy(number => number.Value).Zip(Eigenvalues(query).Order()),
            ["second_eigenvalue"] = query => [(query.Scalar(), query.Chain().ToChain().Spectrum().SubdominantEigenvalue!.Value.Real)],
            ["relaxation_time"] = query => [(query.Scalar(), query.Chain().ToChain().Spectrum().RelaxationTime)],
            ["nstep_distribution"] = NStepDistribution,
            ["nstep_row_nonzeros"] = query => query.Matrix().Select(pair =>
                (pair[1], After(query, query.IntegerArgument("start"), query.IntegerArgument("n"))[(int)pair[0].Value.ToDouble()])),
            ["absorbed_by"] = query => query.Vector().Zip(query.States("n").Select(steps => After(query, 0, steps)[^1])),
            ["complete_by"] = query => query.Vector().Zip(query.States("steps").Select(steps => After(query, 0, steps)[^1])),
            ["transient_row"] = query => query.Vector().Zip(AfterTime(query, query.IntegerArgument("start"))),
            ["availability"] = query => [(query.Scalar(), AfterTime(query, 0)[0])],
            ["reliability"] = Reliability,
            ["embedded_step_matrix"] = query => query.Matrix().SelectMany((row, start) =>
                row.Zip(query.Chain().ToChain().StartingIn(start).AfterTime(query.RationalArgument("step").ToDouble()).ToArray())),
            ["total_variation_worst"] = TotalVariationWorst,
            ["total_variation"] = query => query.Vector().Zip(query.States("n").Select(steps => Distance(query, steps))),
        };

    /// <summary>Kinds of questions whose answers are right to an absolute error, because they come of subtractions.</summary>
    public static IReadOnlySet<string> Absolute { get; } = new HashSet<string> { "total_variation", "total_variation_worst", "eigenvalues", "second_eigenvalue" };

    private static NStepMatrix<int> NStep(PublishedQuery query) => query.Chain().ToStepChain().NStep(query.IntegerArgument("n"));

    /// <summary>Where the source lists each distinct eigenvalue with its multiplicity, one of each group.</summary>
    private static IEnumerable<double> Eigenvalues(PublishedQuery query)
    {
        var computed = query.Chain().ToChain().Spectrum().Eigenvalues.Select(value => value.Real).Order().ToArray();
        if (!query.HasArgument("multiplicities"))
        {
            return computed;
        }

        var groups = query.States("multiplicities");
        return groups.Select((count, group) => computed.Skip(groups.Take(group).Sum()).Take(count)).SelectMany(group => group.Take(1));
    }

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

    private static IEnumerable<Pair> VarianceFirstPassage(PublishedQuery query)
    {
        var variances = query.Chain().ToChain().MeanFirstPassage().Variances();
        return query.Matrix().SelectMany((row, from) => row.Select((published, to) => (published, variances.Variance(from, to))));
    }

    private static IEnumerable<Pair> Lump(PublishedQuery query)
    {
        var groups = query.StateLists("partition");
        return Entries(query, query.Chain().ToChain().Lump(state => groups.First(group => group.Contains(state))[0]));
    }

    /// <summary>The states in the order of the published table, which need not be that of the chain.</summary>
    private static IEnumerable<Pair> Entries(PublishedQuery query, Chain<int> chain)
    {
        var order = query.HasArgument("states") ? query.States("states") : [.. query.StateLists("partition").Select(group => group[0])];
        return query.Matrix().SelectMany((row, from) => row.Select((published, to) => (published, chain[order[from], order[to]])));
    }

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

    private static double[] AfterTime(PublishedQuery query, int start) =>
        query.Chain().ToChain().StartingIn(start).AfterTime(query.RationalArgument("t").ToDouble()).ToArray();

    /// <summary>The probability that the last state, made absorbing, is not reached within the time.</summary>
    private static IEnumerable<Pair> Reliability(PublishedQuery query)
    {
        var failed = query.Chain().StateCount - 1;
        var chain = Chain.FromRates(query.Chain().Rates.Where(move => move.From != failed).Select(move => new TransitionRate<int>(move.From, move.To, move.Rate.ToDouble())));
        var after = chain.StartingIn(query.IntegerArgument("start")).AfterTime(query.RationalArgument("t").ToDouble());
        return [(query.Scalar(), chain.States.Where(state => state != failed).Sum(state => after[state]))];
    }

    /// <summary>The cyclic class that holds a state is the one whose limits give it a share when its phase is looked at, from state 0.</summary>
    private static IEnumerable<Pair> CyclicClassOf(PublishedQuery query)
    {
        var longRun = query.Chain().ToChain().LongRun().Row(0);
        var limits = Enumerable.Range(0, (int)longRun.Period).Select(phase => longRun.AtPhase(phase)).ToList();
        return query.Vector().Zip(Enumerable.Range(0, longRun.Count).Select(state => (double)limits.FindIndex(limit => limit[state] > 0)));
    }

    private static IEnumerable<Pair> TotalVariationWorst(PublishedQuery query)
    {
        var chain = query.Chain().ToChain();
        return query.Vector().Zip(query.States("n").Select(steps => chain.States.Max(start => chain.StartingIn(start).After(steps).TotalVariation(chain.Stationary()))));
    }

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
