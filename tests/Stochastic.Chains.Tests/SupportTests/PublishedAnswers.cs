using Stochastic.Chains.Tests.Support;
using Pair = (Stochastic.Chains.Tests.Support.PublishedNumber Published, Stochastic.Chains.Tests.Support.Rational Exact);

namespace Stochastic.Chains.Tests.SupportTests;

/// <summary>The oracle's answer to each kind of published question, beside the published one.</summary>
internal static class PublishedAnswers
{
    public static IReadOnlyDictionary<string, Func<PublishedQuery, IEnumerable<Pair>>> ByQuery { get; } =
        new Dictionary<string, Func<PublishedQuery, IEnumerable<Pair>>>
        {
            ["stationary"] = query => query.Vector().Zip(Selected(query, "states", query.Chain().ToExact().Stationary())),
            ["restart_ranking"] = query => query.Vector().Zip(query.Chain().ToExact().Stationary()),
            ["stationary_by_class"] = StationaryByClass,
            ["conditional_stationary"] = query => query.Vector().Zip(Conditional(query)),
            ["block_stationary"] = query => query.Vector().Zip(Blocks(query)),
            ["loss_probability"] = query => [(query.Scalar(), query.Chain().ToExact().Stationary()[^1])],
            ["blocking"] = Blocking,
            ["mean_recurrence"] = query => query.Vector().Zip(MeanRecurrence(query)),
            ["mean_first_passage"] = MeanFirstPassage,
            ["variance_first_passage"] = query => Table(query, VarianceFirstPassage(query.Chain().ToExact())),
            ["kemeny_constant"] = query => [(query.Scalar(), query.Chain().ToExact().KemenyConstant())],
            ["commute_time"] = query => query.Vector().Zip([CommuteTime(query.Chain().ToExact(), query.States("pair"))]),
            ["hitting_mean"] = query => query.Vector().Zip(Selected(query, "start", HittingMean(query, query.States("target")))),
            ["hitting_time_mean"] = query => query.Vector().Zip(Selected(query, "start", HittingTime(query, query.States("target")))),
            ["mttf"] = query => query.Vector().Zip(
                Selected(query, "start", HittingTime(query, [query.Chain().StateCount - 1]))),
            ["absorption_mean"] = query => query.Vector().Zip(Transient(query, query.Chain().ToExact().AbsorptionMean())),
            ["absorption_variance"] = query => query.Vector().Zip(Transient(query, query.Chain().ToExact().AbsorptionVariance())),
            ["absorption_probabilities"] = query => AbsorptionInto(query, [.. query.States("absorbing").Select(state => new[] { state })]),
            ["class_absorption_probability"] = query => AbsorptionInto(query, query.StateLists("classes")),
            ["absorption_probability_top"] = query => query.Vector().Zip(
                Transient(query, query.Chain().ToExact().ReachingProbability(query.Chain().StateCount - 1))),
            ["first_probability"] = query => [(query.Scalar(), FirstAppears(query.Chain().ToExact()))],
            ["ruin"] = Ruin,
            ["transition_estimate"] = query => Table(query, Entries(query.Chain())),
            ["pooled_estimate"] = query => Table(query, Entries(query.Chain())),
            ["matrix_entries"] = query => query.Vector().Zip(
                query.StateLists("entries").Select(pair => Entries(query.Chain())[pair[0], pair[1]])),
            ["nstep_matrix"] = query => Table(query, query.Chain().ToExact().NStepMatrix(query.IntegerArgument("n"))),
            ["nstep_row"] = query => query.Vector().Zip(query.Chain().ToExact().NStepRow(query.IntegerArgument("start"), Steps(query))),
            ["nstep_distribution"] = query => query.Vector().Zip(query.Chain().ToExact().NStepDistribution(Initial(query), Steps(query))),
            ["nstep_row_nonzeros"] = NStepRowNonzeros,
            ["absorbed_by"] = query => AbsorbedBy(query, "n"),
            ["complete_by"] = query => AbsorbedBy(query, "steps"),
            ["total_variation"] = TotalVariation,
            ["total_variation_worst"] = TotalVariationWorst,
        };

    private static IEnumerable<Pair> StationaryByClass(PublishedQuery query)
    {
        var chain = query.Chain().ToExact();
        return query.Matrix().Zip(query.StateLists("classes")).SelectMany(pair =>
        {
            var home = chain.Structure.Classes[chain.Structure.ClassOf[pair.Second[0]]];
            return pair.First.Zip(pair.Second.Select(state => chain.Stationary(home)[state]));
        });
    }

    private static IEnumerable<Rational> Conditional(PublishedQuery query)
    {
        var stationary = query.Chain().ToExact().Stationary();
        var total = Rational.Sum(query.States("states").Select(state => stationary[state]));
        return query.States("states").Select(state => stationary[state] / total);
    }

    private static IEnumerable<Rational> Blocks(PublishedQuery query)
    {
        var stationary = query.Chain().ToExact().Stationary();
        return query.StateLists("blocks").Select(block => Rational.Sum(block.Select(state => stationary[state])));
    }

    private static IEnumerable<Pair> Blocking(PublishedQuery query) => query.Vector().Zip(query.States("circuits").Zip(
        query.Arguments.GetProperty("load").EnumerateArray(),
        (circuits, load) => LineRules.LossSystem(circuits, Rational.Parse(load.GetString()!)).ToExact().Stationary()[^1]));

    private static IEnumerable<Rational> MeanRecurrence(PublishedQuery query)
    {
        var chain = query.Chain().ToExact();
        var states = query.HasArgument("states") ? query.States("states")
            : query.HasArgument("state") ? query.States("state")
            : [.. Enumerable.Range(0, chain.StateCount)];
        return states.Select(state => chain.MeanRecurrence(state)!.Value);
    }

    private static IEnumerable<Pair> MeanFirstPassage(PublishedQuery query)
    {
        var table = query.Chain().ToExact().MeanFirstPassage();
        return query.HasArgument("pairs")
            ? query.Vector().Zip(query.StateLists("pairs").Select(pair => table[pair[0], pair[1]]!.Value))
            : query.Matrix().SelectMany((row, i) => row.Select((number, j) => (number, table[i, j]!.Value)));
    }

    /// <summary>On the diagonal the variance of the recurrence time, by its first step.</summary>
    private static Rational[,] VarianceFirstPassage(ExactChain chain)
    {
        var result = new Rational[chain.StateCount, chain.StateCount];
        for (var target = 0; target < chain.StateCount; target++)
        {
            var mean = chain.HittingMean(target);
            var variance = chain.HittingVariance(target);
            var recurrence = chain.MeanRecurrence(target)!.Value;
            for (var from = 0; from < chain.StateCount; from++)
            {
                result[from, target] = from != target
                    ? variance[from]!.Value
                    : (chain.SelfLoop(target) * Rational.Pow(1 - recurrence, 2)) + Rational.Sum(chain.Row(target).Moves.Select(move =>
                        move.Probability * (variance[move.To]!.Value + Rational.Pow(1 + mean[move.To]!.Value - recurrence, 2))));
            }
        }

        return result;
    }

    private static Rational CommuteTime(ExactChain chain, int[] pair) =>
        chain.HittingMean(pair[1])[pair[0]]!.Value + chain.HittingMean(pair[0])[pair[1]]!.Value;

    private static Rational[] HittingMean(PublishedQuery query, int[] target) =>
        Array.ConvertAll(query.Chain().ToExact().HittingMean(target), mean => mean!.Value);

    private static Rational[] HittingTime(PublishedQuery query, int[] target) =>
        Array.ConvertAll(HittingMean(query, target), mean => mean / query.Chain().UniformizationRate!.Value);

    private static IEnumerable<Pair> AbsorptionInto(PublishedQuery query, int[][] classes)
    {
        var chain = query.Chain().ToExact();
        var probabilities = chain.AbsorptionProbabilities();
        return query.Matrix().Zip(query.States("transient")).SelectMany(row => row.First.Zip(classes.Select(states =>
            probabilities[row.Second, Enumerable.Range(0, chain.Structure.RecurrentClasses.Count)
                .Single(k => chain.Structure.RecurrentClasses[k].States.SequenceEqual(states))])));
    }

    private static Rational FirstAppears(ExactChain chain) => chain.ReachingProbability(chain.StateCount - 2)[0];

    private static IEnumerable<Pair> Ruin(PublishedQuery query)
    {
        var (start, top) = (query.IntegerArgument("z"), query.IntegerArgument("a"));
        var chain = query.Chain().ToExact();
        var success = chain.ReachingProbability(top)[start];
        return
        [
            (query.Member("ruin"), chain.ReachingProbability(0)[start]),
            (query.Member("success"), success),
            (query.Member("gain"), (top * success) - start),
            (query.Member("duration"), chain.AbsorptionMean()[start]),
        ];
    }

    private static IEnumerable<Pair> NStepRowNonzeros(PublishedQuery query)
    {
        var row = query.Chain().ToExact().NStepRow(query.IntegerArgument("start"), query.IntegerArgument("n"));
        return query.Matrix().SelectMany(pair => new[]
        {
            (pair[0], pair[0].Value),
            (pair[1], row[(int)pair[0].Value.ToDouble()]),
        });
    }

    private static IEnumerable<Pair> AbsorbedBy(PublishedQuery query, string steps)
    {
        var chain = query.Chain().ToExact();
        return query.Vector().Zip(query.States(steps).Select(count => chain.NStepRow(0, count)[^1]));
    }

    private static IEnumerable<Pair> TotalVariation(PublishedQuery query)
    {
        var chain = query.Chain().ToExact();
        return query.Vector().Zip(query.States("n").Select(steps => Distance(chain, query.IntegerArgument("start"), steps)));
    }

    private static IEnumerable<Pair> TotalVariationWorst(PublishedQuery query)
    {
        var chain = query.Chain().ToExact();
        return query.Vector().Zip(query.States("n").Select(steps =>
            Enumerable.Range(0, chain.StateCount).Select(start => Distance(chain, start, steps)).Max()));
    }

    private static Rational Distance(ExactChain chain, int start, int steps) =>
        Rational.Sum(chain.NStepRow(start, steps).Zip(chain.Stationary(), (now, limit) => Rational.Abs(now - limit))) / 2;

    private static Rational[,] Entries(PublishedChain chain)
    {
        var entries = new Rational[chain.StateCount, chain.StateCount];
        foreach (var (from, to, probability) in chain.OffDiagonals.Concat(chain.SelfLoops))
        {
            entries[from, to] = probability;
        }

        return entries;
    }

    private static IEnumerable<Pair> Table(PublishedQuery query, Rational[,] exact) =>
        query.Matrix().SelectMany((row, i) => row.Select((number, j) => (number, exact[i, j])));

    private static int Steps(PublishedQuery query) => query.IntegerArgument(query.HasArgument("steps") ? "steps" : "n");

    private static Rational[] Initial(PublishedQuery query) =>
        [.. query.Arguments.GetProperty("initial").EnumerateArray().Select(item => Rational.Parse(item.GetString()!))];

    private static IEnumerable<Rational> Selected(PublishedQuery query, string argument, Rational[] all) =>
        query.HasArgument(argument) ? query.States(argument).Select(state => all[state]) : all;

    /// <summary>The listed transient states, or the start where the answer is a single number.</summary>
    private static IEnumerable<Rational> Transient(PublishedQuery query, Rational[] all) =>
        query.HasArgument("transient") ? query.States("transient").Select(state => all[state]) : [all[0]];
}
