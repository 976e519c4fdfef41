using Stochastic.Chains.Benchmarks.Measuring;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Benchmarks.Accuracy;

/// <summary>Holds every method against exact arithmetic. The exit code is 1 if any answer is further off than its certificate claims.</summary>
internal static class AccuracyRun
{
    internal const string FileName = "accuracy.json";

    private const int ChainsEach = 5;

    internal static int Write()
    {
        var machine = Machine.Now("not used");
        List<Measured> rows = [.. Inquiries.All.SelectMany(inquiry => inquiry.Families.SelectMany(family => Measure(inquiry, family)))];
        new ResultFile<Measured>(machine.Finished(), rows).Write(FileName);
        var violations = rows.Sum(row => row.Violations);
        Console.WriteLine($"{rows.Sum(row => row.Answered)} answers, {violations} of them further off than their bound.");
        return violations == 0 ? 0 : 1;
    }

    private static IEnumerable<Measured> Measure(Inquiry inquiry, AccuracyFamily family)
    {
        var samples = Enumerable.Range(0, ChainsEach).Select(seed =>
        {
            var matrix = family.Create((ulong)seed);
            return (Matrix: matrix, Chain: Chain.FromMatrix(matrix), Truth: inquiry.Truth(ExactChain.FromMatrix(matrix)));
        }).ToList();
        Console.WriteLine($"{inquiry.Question}, {family.Name} {family.Coupling}");
        return inquiry.Trials.Select(trial =>
        {
            List<Answer> answers = [.. samples.Select(sample => Judge(trial.Try(sample.Chain, sample.Matrix), sample.Truth)).OfType<Answer>()];
            var kind = answers.Count == 0 ? BoundKind.None : answers.Min(answer => answer.Kind);
            return new Measured(
                inquiry.Question,
                family.Name,
                family.Coupling,
                trial.Name,
                ChainsEach,
                answers.Count,
                answers.Select(answer => answer.Error).DefaultIfEmpty(double.PositiveInfinity).Max(),
                kind == BoundKind.None ? double.PositiveInfinity : answers.Where(answer => answer.Kind == kind).Max(answer => answer.Bound),
                kind,
                answers.Count(answer => answer.IsViolation));
        });
    }

    private static Answer? Judge((double[] Values, Certificate? Certificate)? answer, Rational[] truth)
    {
        if (answer is not var (values, certificate))
        {
            return null;
        }

        var error = Trial.RelativeError(truth, values);
        var isViolation = certificate is not null && (error > certificate.RelativeErrorBound || Trial.AbsoluteError(truth, values) > certificate.AbsoluteErrorBound);
        return certificate switch
        {
            { RelativeErrorBound: var bound } when double.IsFinite(bound) => new Answer(error, bound, BoundKind.Relative, isViolation),
            { AbsoluteErrorBound: var bound } when double.IsFinite(bound) => new Answer(error, bound, BoundKind.Absolute, isViolation),
            _ => new Answer(error, double.PositiveInfinity, BoundKind.None, isViolation),
        };
    }

    private sealed record Answer(double Error, double Bound, BoundKind Kind, bool IsViolation);
}
