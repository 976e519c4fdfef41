using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Sensitivity;

/// <summary>
/// Derivatives against exact differences: the answers of P + tD and P − tD in fractions, with t = 2⁻¹⁰⁰, so that the central difference is the derivative to
/// about t², far below the digits compared.
/// </summary>
public sealed class DerivativeTests
{
    private const int Chains = 12;
    private static readonly Rational Step = Rational.Pow(2, -100);

    [Fact]
    public void Long_run_shares_change_as_exact_differences_say()
    {
        foreach (var (matrix, direction) in Irreducible())
        {
            var derivative = Chain.FromMatrix(matrix).StationaryDerivative(direction);

            ShouldBe(derivative, Difference(matrix, direction, chain => chain.Stationary()));
            derivative.Values.ToArray().Sum().Should().BeApproximately(0, Tolerances.Published);
        }
    }

    [Fact]
    public void Mean_times_change_as_exact_differences_say()
    {
        foreach (var (matrix, direction) in Irreducible())
        {
            ShouldBe(
                Chain.FromMatrix(matrix).TimeDerivative(0, direction),
                Difference(matrix, direction, chain => Array.ConvertAll(chain.HittingMean(0), mean => mean!.Value)));
        }
    }

    [Fact]
    public void Probabilities_of_ends_change_as_exact_differences_say()
    {
        foreach (var (matrix, direction) in Ending())
        {
            ShouldBe(
                Chain.FromMatrix(matrix).AbsorptionDerivative(4, direction),
                Difference(matrix, direction, chain => chain.ReachingProbability(4)));
        }
    }

    [Fact]
    public void Distributions_after_steps_change_as_exact_differences_say()
    {
        foreach (var (matrix, direction) in Irreducible().Concat(Ending()))
        {
            ShouldBe(Chain.FromMatrix(matrix).AfterDerivative(1, 7, direction), Difference(matrix, direction, chain => chain.NStepRow(1, 7)));
        }

        Chain.FromMatrix(new[,] { { 1.0 } }).AfterDerivative(0, 0).Values.ToArray().Should().Equal(0);
    }

    [Fact]
    public void Group_inverse_solves_its_equations()
    {
        foreach (var (matrix, _) in Irreducible())
        {
            var chain = Chain.FromMatrix(matrix);
            var inverse = chain.GroupInverse().ToMatrix();
            var generator = MathNet.Numerics.LinearAlgebra.Matrix<double>.Build.DenseIdentity(chain.StateCount) - chain.ToMatrix();

            // Meyer (1975): A A# A = A, A# A A# = A#, A A# = A# A.
            ((generator * inverse * generator) - generator).L2Norm().Should().BeLessThan(Tolerances.Published);
            ((inverse * generator * inverse) - inverse).L2Norm().Should().BeLessThan(Tolerances.Published);
            ((generator * inverse) - (inverse * generator)).L2Norm().Should().BeLessThan(Tolerances.Published);
        }
    }

    [Fact]
    public void Golub_and_meyers_formula_gives_the_same_derivative()
    {
        foreach (var (matrix, direction) in Irreducible())
        {
            var chain = Chain.FromMatrix(matrix);
            var (shares, inverse, derivative) = (chain.Stationary(), chain.GroupInverse(), chain.StationaryDerivative(direction));

            foreach (var state in chain.States)
            {
                derivative[state].Should().BeApproximately(direction.Sum(change => shares[change.From] * change.Rate * inverse[change.To, state]), Tolerances.Published);
            }
        }
    }

    [Fact]
    public void Times_of_a_chain_made_from_rates_change_in_its_unit()
    {
        // Uniformized at 10 per hour, a failure has probability 0.2 and a mean time of 1/(10 · 0.2) hours, whose derivative is −1/(10 · 0.2²).
        var chain = Chain.FromRates([new TransitionRate<string>("runs", "failed", 2), new TransitionRate<string>("failed", "runs", 10)]);
        var failure = chain["runs", "failed"];

        chain.TimeDerivative("failed", new("runs", "failed", 1), new("runs", "runs", -1))["runs"]
            .Should().BeApproximately(-1 / (chain.UniformizationRate!.Value * failure * failure), Tolerances.Published);
    }

    [Fact]
    public void Questions_without_a_derivative_are_refused()
    {
        var chain = Chain.Build<string>(rows => rows
            .Row("a", ("a", 0.5), ("b", 0.3), ("end", 0.2)).Row("b", ("a", 1)).Row("end", ("end", 1)));

        FluentActions.Invoking(() => chain.StationaryDerivative()).Should().Throw<ChainStructureException>().WithMessage("*2 communicating classes*");
        FluentActions.Invoking(chain.GroupInverse).Should().Throw<ChainStructureException>();
        FluentActions.Invoking(() => chain.TimeDerivative("b")).Should().Throw<ChainStructureException>().WithMessage("*AbsorptionDerivative*");
        FluentActions.Invoking(() => chain.AbsorptionDerivative("end", new("end", "a", 1), new("end", "end", -1))).Should().Throw<ChainStructureException>();
        FluentActions.Invoking(() => chain.AfterDerivative("a", -1)).Should().Throw<ArgumentOutOfRangeException>();
        FluentActions.Invoking(() => chain.AfterDerivative("a", 1, [new("a", "b", double.NaN)])).Should().Throw<ArgumentException>().WithMessage("*finite*");
        FluentActions.Invoking(() => chain.AfterDerivative("a", 1, new("a", "b", 1), new("a", "a", -0.5))).Should().Throw<ArgumentException>().WithMessage("*'a' sum to 0.5*");
        FluentActions.Invoking(() => chain.AfterDerivative("b", 1, new("b", "a", 1), new("b", "end", -1))).Should().Throw<ArgumentException>().WithMessage("*'b' to 'end' is 0*");
        FluentActions.Invoking(() => chain.AfterDerivative("z", 1)).Should().Throw<UnknownStateException>();
    }

    [Fact]
    public void Derivatives_read_the_same_in_every_culture_and_claim_no_bound()
    {
        using var culture = new CommaCulture();
        var chain = Chain.FromMatrix(new[,] { { 0.75, 0.25 }, { 0.5, 0.5 } });
        var derivative = chain.StationaryDerivative(new(0, 1, 1), new(0, 0, -1));

        derivative.ToString().Should().Contain("0.8889");
        derivative.Certificate.IsProof.Should().BeFalse();
        chain.GroupInverse().ToString().Should().StartWith("Group inverse over 2 states");
        chain.GroupInverse().Certificate.RelativeErrorBound.Should().Be(double.PositiveInfinity);
        chain.GroupInverse()[0, 1].Should().Be(chain.GroupInverse().Values[1]);
    }

    private static void ShouldBe(StateDerivatives<int> derivative, Rational[] exact)
    {
        var size = exact.Max(value => Math.Abs(value.ToDouble()));
        foreach (var state in derivative.States)
        {
            derivative[state].Should().BeApproximately(exact[state].ToDouble(), Tolerances.Published * size);
        }
    }

    private static Rational[] Difference(double[,] matrix, ProbabilityChange<int>[] direction, Func<ExactChain, Rational[]> answer)
    {
        var (above, below) = (answer(Moved(matrix, direction, Step)), answer(Moved(matrix, direction, -Step)));
        return [.. above.Zip(below).Select(pair => (pair.First - pair.Second) / (2 * Step))];
    }

    private static ExactChain Moved(double[,] matrix, ProbabilityChange<int>[] direction, Rational step)
    {
        var size = matrix.GetLength(0);
        var moves = from i in Enumerable.Range(0, size)
                    from j in Enumerable.Range(0, size)
                    where i != j && matrix[i, j] > 0
                    let change = Rational.Sum(direction.Where(entry => entry.From == i && entry.To == j).Select(entry => Rational.FromDouble(entry.Rate)))
                    select (i, j, Rational.FromDouble(matrix[i, j]) + (change * step));
        return new ExactChain(size, moves, Enumerable.Range(0, size));
    }

    /// <summary>Dense chains of five states in sixty-fourths, each with a direction over two of its rows.</summary>
    private static IEnumerable<(double[,] Matrix, ProbabilityChange<int>[] Direction)> Irreducible()
    {
        var seeded = new Random(20260105);
        for (var sample = 0; sample < Chains; sample++)
        {
            var matrix = new double[5, 5];
            for (var row = 0; row < 5; row++)
            {
                FillRow(matrix, row, seeded);
            }

            yield return (matrix, [.. Exchange(1, seeded), .. Exchange(3, seeded)]);
        }
    }

    /// <summary>Chains of six states with two ends.</summary>
    private static IEnumerable<(double[,] Matrix, ProbabilityChange<int>[] Direction)> Ending()
    {
        var seeded = new Random(20260106);
        for (var sample = 0; sample < Chains; sample++)
        {
            var matrix = new double[6, 6];
            for (var row = 0; row < 4; row++)
            {
                FillRow(matrix, row, seeded);
            }

            (matrix[4, 4], matrix[5, 5]) = (1, 1);
            yield return (matrix, [.. Exchange(0, seeded), .. Exchange(2, seeded)]);
        }
    }

    private static void FillRow(double[,] matrix, int row, Random seeded)
    {
        var size = matrix.GetLength(1);
        var left = 64;
        for (var column = 0; column < size - 1; column++)
        {
            var part = seeded.Next(1, Math.Max(2, left / 3));
            matrix[row, column] = part / 64.0;
            left -= part;
        }

        matrix[row, size - 1] = left / 64.0;
    }

    private static ProbabilityChange<int>[] Exchange(int row, Random seeded)
    {
        var (first, second) = (seeded.Next(1, 9), seeded.Next(1, 9));
        return [new(row, 0, first), new(row, 4, second), new(row, 2, -first - second)];
    }
}
