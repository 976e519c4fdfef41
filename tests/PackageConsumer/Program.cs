using PackageConsumer;
using Stochastic.Chains;

// Each main call of the library, on invented chains whose figures can be worked out by hand.
var checks = new FigureChecks();

// A pool of crates, one step a week. A round through the shop takes 1.25 + 2 + 0.98 + 0.049 weeks and ends the crate's life with
// probability 0.02 + 0.98 · 0.05 · 0.2 = 0.0298.
Chain<string> pool = Chain.Build<string>(rows => rows
    .Row("clean", ("clean", 0.20), ("at shop", 0.80))
    .Row("at shop", ("at shop", 0.50), ("dirty", 0.49), ("lost", 0.01))
    .Row("dirty", ("clean", 0.95), ("in repair", 0.05))
    .Row("in repair", ("clean", 0.80), ("scrapped", 0.20))
    .Row("lost", ("lost", 1.00))
    .Row("scrapped", ("scrapped", 1.00)));

StepDistribution<string> inFourWeeks = pool.StartingIn("dirty").After(4);
checks.Figure("clean after four weeks", inFourWeeks["clean"], 0.36298);
checks.Figure("lost after four weeks", inFourWeeks["lost"], 0.01324);

var stock = Distribution.FromWeights(pool.States, ("clean", 3), ("at shop", 1));
checks.Figure("stock at shop after a week", pool.StartingIn(stock).After(1)["at shop"], (0.75 * 0.8) + (0.25 * 0.5));

checks.Figure("forecast of four weeks", pool.StartingIn("dirty").Forecast(6)[4]["clean"], 0.36298);
checks.Figure("a chain for each week", pool.StartingIn("dirty").Through([pool, pool, pool, pool])["lost"], 0.01324);
PopulationForecast<string> crates = pool.StartingWith(("clean", 100)).WithRecruitment(("clean", 5)).WithLosses(("clean", 0.1)).Forecast(1);
checks.Figure("crates after a week", crates.Expected("clean", 1), (100 * 0.9 * 0.2) + 5);
checks.Figure("chance of none at the shop", pool.StartingWith(("clean", 2)).Forecast(1).Count("at shop", 1).AtMost(0), 0.04);
checks.Figure("lost in the end", pool.LongRun()["clean", "lost"], 0.02 / 0.0298);
checks.Figure("lost in the end, one start", pool.StartingIn("clean").LongRun()["lost"], 0.02 / 0.0298);
NStepMatrix<string> fourWeeks = pool.NStep(4).Require(relativeError: 1e-12);
checks.Figure("clean after four weeks, from the matrix", fourWeeks["dirty", "clean"], 0.36298);
checks.Figure("the same from the spectrum", pool.Spectrum().NStep("dirty", 4)["clean"], 0.36298);

Absorption<string> ends = pool.Absorption().Require(relativeError: 1e-12);
checks.Figure("ends up lost", ends.Probability("clean", "lost"), 0.02 / 0.0298);
checks.Figure("weeks until the end", ends.MeanSteps("clean"), 4.279 / 0.0298);
checks.Figure("weeks until lost or scrapped", pool.TimeToAny(["lost", "scrapped"]).Mean("clean"), 4.279 / 0.0298);

checks.Figure("weeks at a shop", ends.ExpectedVisits("clean", "at shop"), 2 / 0.0298);
checks.Holds("the end can be given", ends.Conditional("lost").States.Count == 5 && ends.StepsIfInto("lost").Mean("clean") > 0);
checks.Holds("a deviation is near the mean where ends are rare", Math.Abs((ends.StandardDeviationOfSteps("clean") / ends.MeanSteps("clean")) - 1) < 0.1);
checks.Holds("half are gone before the mean", ends.Steps.Quantile("clean", 0.5) < ends.MeanSteps("clean"));
checks.Figure("repaired before lost", pool.Before("in repair", "lost").Probability("at shop"), 0.98 * 0.05 / (0.02 + (0.98 * 0.05)));
checks.Holds("those still in settle", pool.QuasiStationary().DecayRate is > 0.006 and < 0.008);

HittingTimes<string> untilLost = pool.TimeTo("lost");
checks.Holds("may never be lost", double.IsPositiveInfinity(untilLost.Mean("clean")));
checks.Figure("ever lost", untilLost.ReachingProbability("clean"), 0.02 / 0.0298);

ChainStructure<string> structure = pool.Structure();
checks.Holds("two ends", structure.AbsorbingStates.SequenceEqual(["lost", "scrapped"]));
checks.Holds("no single long run is refused", Refused<ChainStructureException>(() => pool.Stationary()));

// A pump, one step a week: ten weeks new, four worn, one failed.
double[,] table = { { 0.90, 0.10, 0.00 }, { 0.00, 0.75, 0.25 }, { 1.00, 0.00, 0.00 } };
Chain<Stage> pump = Chain.FromMatrix([Stage.New, Stage.Worn, Stage.Failed], table);
StationaryDistribution<Stage> shares = pump.Stationary().Require(relativeError: 1e-12);
checks.Figure("share new", shares[Stage.New], 10.0 / 15);
checks.Figure("share failed", shares[Stage.Failed], 1.0 / 15);
checks.Holds("the certificate is a proof", shares.Certificate.IsProof);
checks.Figure("share failed, linear system", pump.Stationary(new LinearSystemMethod())[Stage.Failed], 1.0 / 15);
checks.Figure("share failed, polished", pump.Stationary(new PolishedMethod(new LinearSystemMethod())).Require(relativeError: 1e-15)[Stage.Failed], 1.0 / 15);
checks.Figure("share failed, aggregation", pump.Stationary(new AggregationMethod())[Stage.Failed], 1.0 / 15);
double wear = pump.StationaryDerivative(new(Stage.New, Stage.Worn, 1), new(Stage.New, Stage.New, -1))[Stage.Failed];
checks.Figure("slope of the share failed", wear, 100.0 / 225); // the share is 1/(1/p + 5) at p = 1/10
checks.Figure("group inverse", pump.GroupInverse()[Stage.New, Stage.New], 210.0 / 225);
checks.Figure("weeks until failed", pump.TimeTo(Stage.Failed).Mean(Stage.New), 14);
FirstPassageTable<Stage> passages = pump.MeanFirstPassage().Require(relativeError: 1e-12);
checks.Figure("weeks between failures", passages[Stage.Failed, Stage.Failed], 15);
checks.Figure("Kemeny's constant", passages.KemenyConstant, 54.0 / 15);
checks.Holds("tables can be printed", shares.ToString().Contains("Failed", StringComparison.Ordinal));

// Two pumps, either of which is enough, one repair crew; moves per hour.
Chain<string> plant = Chain.FromRates([
    new TransitionRate<string>("both run", "one runs", 2e-4),
    new TransitionRate<string>("one runs", "both run", 0.05),
    new TransitionRate<string>("one runs", "none runs", 1e-4),
    new TransitionRate<string>("none runs", "one runs", 0.05)]);
checks.Figure("hours until none runs", plant.TimeTo("none runs").Mean("both run"), ((3 * 1e-4) + 0.05) / (2 * 1e-4 * 1e-4));
checks.Figure("share of time none runs", plant.Stationary()["none runs"], 8e-6 / 1.004008);

Chain<string> single = Chain.FromRates([new TransitionRate<string>("runs", "failed", 0.5), new TransitionRate<string>("failed", "runs", 0.5)]);
checks.Figure("failed after three hours", single.StartingIn("runs").AfterTime(3)["failed"], (1 - Math.Exp(-3)) / 2);

Chain<int> moves = Chain.FromTransitions([new Transition<int>(7, 9, 1.0), new Transition<int>(9, 7, 1.0)]);
checks.Figure("period", moves.Structure().Period, 2);
checks.Figure("every second step", moves.StartingIn(7).LongRun().AtPhase(4)[7], 1);

// Counted from a log: of three moves out of "clean", two led to the shop.
var columns = new EventLogColumns { Item = "crate", Time = "at", State = "stage" };
using var scans = new StringReader("""
    crate,at,stage
    1,2025-01-06T08:00:00Z,clean
    2,2025-01-06T08:00:00Z,clean
    1,2025-01-07T08:00:00Z,at shop
    2,2025-01-07T08:00:00Z,clean
    1,2025-01-08T08:00:00Z,clean
    2,2025-01-08T08:00:00Z,at shop
    """);
TransitionCounts<string> counts = EventLog.CountCsv(scans, columns);
checks.Figure("moves counted", counts.TotalCount, 4);
checks.Figure("probability from counts", counts.ToChain()["clean", "at shop"], 2.0 / 3);

checks.Figure("standard error of a probability", counts.Estimate().StandardError("clean", "at shop"), Math.Sqrt(2.0 / 3 / 3 / 3));
checks.Figure("a prior of one for each move", counts.Estimate(new EstimateOptions<string> { Prior = DirichletPrior.Uniform<string>() })["clean", "at shop"], 3.0 / 5);
checks.Holds("few moves find nothing", !counts.TestIndependence().Rejects(0.05));
AnswerConfidence confidence = counts.Confidence(chain => chain["clean", "at shop"]);
checks.Holds("the interval holds the estimate", confidence.Interval.Contains(confidence.Estimate) && confidence.Draws == 1000);
checks.Holds("by slope about as far", counts.TimeError("clean", "at shop", new EstimateOptions<string>()).StandardError > 0);
checks.Holds("random numbers are fixed", new RandomNumbers(42, 7).NextBits() == 0xe55410cc67ee6f2c);

bool isChain = Chain.TryFromMatrix(["a", "b"], new[,] { { 0.5, 0.6 }, { -1, 2 } }, out _, out IReadOnlyList<ChainFault> faults);
checks.Holds("all faults are listed", !isChain && faults.Count >= 3);

return checks.Close();

static bool Refused<TException>(Action question)
    where TException : Exception
{
    try
    {
        question();
        return false;
    }
    catch (TException)
    {
        return true;
    }
}
