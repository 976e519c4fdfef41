using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Tests.Kernels;

public class RealSchurFormTests
{
    public static TheoryData<string> Families => EigenCases.Names;

    [Theory]
    [MemberData(nameof(Families))]
    public void The_matrix_is_Q_T_Qᵀ_with_Q_orthogonal_and_T_quasi_triangular(string family)
    {
        var cases = EigenCases.Of(family).ToList();

        cases.Should().HaveCount(15);
        foreach (var (name, order, matrix) in cases)
        {
            var form = RealSchurForm.Of(matrix, order, balance: false, CancellationToken.None);

            form.HasConverged.Should().BeTrue("{0} of order {1} spent {2} sweeps", name, order, form.Sweeps);
            ShouldBeQuasiTriangular(form, $"{name}, order {order}");
            EigenChecks.OrthogonalityError(form.TransposedBasis, order).Should().BeLessThanOrEqualTo(EigenChecks.Bound(order), "{0}, order {1}", name, order);
            EigenChecks.FactorizationError(matrix, form.TransposedBasis, form.Quasitriangle, order)
                .Should().BeLessThanOrEqualTo(EigenChecks.Bound(order), "{0}, order {1}", name, order);
        }
    }

    [Theory]
    [InlineData(100)]
    [InlineData(129)]
    public void Larger_matrices_are_decomposed_as_well(int order)
    {
        var matrix = EigenCases.RandomStochastic(order, new Random(order));

        var form = RealSchurForm.Of(matrix, order, balance: false, CancellationToken.None);

        ShouldBeQuasiTriangular(form, $"order {order}");
        EigenChecks.OrthogonalityError(form.TransposedBasis, order).Should().BeLessThanOrEqualTo(EigenChecks.Bound(order));
        EigenChecks.FactorizationError(matrix, form.TransposedBasis, form.Quasitriangle, order).Should().BeLessThanOrEqualTo(EigenChecks.Bound(order));
    }

    [Fact]
    public void The_given_matrix_is_not_changed()
    {
        var matrix = EigenCases.Ehrenfest(6);
        var copy = matrix.ToArray();

        RealSchurForm.Of(matrix, 6, balance: true, CancellationToken.None);

        matrix.Should().Equal(copy);
    }

    [Fact]
    public void A_periodic_matrix_needs_the_exceptional_shift_after_ten_sweeps()
    {
        var cycle = EigenCases.Cycle(12);

        RealSchurForm.Of(cycle, 12, balance: false, sweepCap: 9, CancellationToken.None).UnresolvedRows.Should().Be(12);
        RealSchurForm.Of(cycle, 12, balance: false, CancellationToken.None).HasConverged.Should().BeTrue();
    }

    [Theory]
    [InlineData(0)]
    [InlineData(1)]
    [InlineData(7)]
    public void A_spent_cap_is_reported_with_the_rows_that_are_left(int cap)
    {
        var matrix = EigenCases.RandomStochastic(20, new Random(4));

        var form = RealSchurForm.Of(matrix, 20, balance: false, cap, CancellationToken.None);

        form.HasConverged.Should().BeFalse();
        form.Sweeps.Should().Be(cap);
        form.UnresolvedRows.Should().BeInRange(3, 20);
        form.Invoking(unfinished => unfinished.Eigenvalues()).Should().Throw<InvalidOperationException>().WithMessage($"*after {cap} QR sweep*HasConverged*");
        EigenChecks.FactorizationError(matrix, form.TransposedBasis, form.Quasitriangle, 20).Should().BeLessThanOrEqualTo(EigenChecks.Bound(20));
    }

    [Fact]
    public void The_default_cap_is_thirty_sweeps_per_row()
    {
        foreach (var (name, order, matrix) in EigenCases.All)
        {
            var form = RealSchurForm.Of(matrix, order, balance: false, sweepCap: 30 * order, CancellationToken.None);

            form.Sweeps.Should().Be(RealSchurForm.Of(matrix, order, balance: false, CancellationToken.None).Sweeps);
            form.Sweeps.Should().BeLessThan(10 * order, "{0} of order {1} should stay away from the cap", name, order);
        }
    }

    [Fact]
    public void Thousands_of_small_sparse_matrices_of_zeros_and_signs_all_converge()
    {
        var random = new Random(99);
        for (var count = 0; count < 3000; count++)
        {
            var order = random.Next(2, 14);
            var matrix = EigenCases.Table(order, (_, _) => random.Next(4) == 0 ? random.Next(-1, 2) : 0);

            var form = RealSchurForm.Of(matrix, order, balance: false, CancellationToken.None);

            var isExact = form.HasConverged
                && EigenChecks.FactorizationError(matrix, form.TransposedBasis, form.Quasitriangle, order) <= EigenChecks.Bound(order);
            isExact.Should().BeTrue("matrix {0} of order {1} spent {2} sweeps", count, order, form.Sweeps);
        }
    }

    [Fact]
    public void Equal_matrices_give_equal_bits()
    {
        var matrix = EigenCases.RandomStochastic(40, new Random(2));

        var (first, second) = (Form(), Form());

        second.Quasitriangle.Should().Equal(first.Quasitriangle);
        second.TransposedBasis.Should().Equal(first.TransposedBasis);

        RealSchurForm Form() => RealSchurForm.Of(matrix, 40, balance: true, CancellationToken.None);
    }

    [Theory]
    [InlineData(double.NaN, "NaN")]
    [InlineData(double.PositiveInfinity, "Infinity")]
    [InlineData(double.NegativeInfinity, "-Infinity")]
    public void An_entry_that_is_not_finite_is_refused_by_its_place(double entry, string text)
    {
        var matrix = EigenCases.Cycle(4);
        matrix[(2 * 4) + 1] = entry;

        FluentActions.Invoking(() => RealSchurForm.Of(matrix, 4, balance: false, CancellationToken.None))
            .Should().Throw<ArgumentException>().WithMessage($"Entry (2, 1) of the matrix, counted from 0, is {text}. Give finite numbers.*");
    }

    [Theory]
    [InlineData(5, 2)]
    [InlineData(0, 0)]
    [InlineData(1, -1)]
    public void A_matrix_that_is_not_square_is_refused(int length, int order)
    {
        FluentActions.Invoking(() => RealSchurForm.Of(new double[length], order, balance: false, CancellationToken.None))
            .Should().Throw<ArgumentException>().WithMessage("*order times order entries*");
    }

    [Theory]
    [InlineData(2)]
    [InlineData(30)]
    public void A_canceled_decomposition_stops(int order)
    {
        // Of order 2 there is nothing to reduce: the sweeps look at the token, too.
        var canceled = new CancellationToken(canceled: true);

        FluentActions.Invoking(() => RealSchurForm.Of(EigenCases.Cycle(order), order, balance: false, canceled)).Should().Throw<OperationCanceledException>();
    }

    private static void ShouldBeQuasiTriangular(RealSchurForm form, string because)
    {
        var order = form.Order;
        for (var row = 1; row < order; row++)
        {
            form.Quasitriangle.AsSpan(row * order, row - 1).ContainsAnyExcept(0.0).Should().BeFalse(because);
            (form.IsPairStart(row - 1) && form.IsPairStart(row)).Should().BeFalse(because);
            if (form.IsPairStart(row - 1))
            {
                DiagonalBlock.At(form.Quasitriangle, order, row - 1).TryRealEigenvector(out _, out _).Should().BeFalse(because);
            }
        }
    }
}
