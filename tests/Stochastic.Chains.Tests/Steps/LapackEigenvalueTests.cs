using System.Numerics;
using Stochastic.Chains.Tests.Kernels;

namespace Stochastic.Chains.Tests.Steps;

/// <summary>
/// Against LAPACK: computed once by numpy 1.24.2 (numpy.linalg.eigvals, which calls dgeev of OpenBLAS 0.3.21) from the same weights, each
/// row divided by its sum; printed in full, sorted by modulus. The chains are invented.
/// </summary>
public class LapackEigenvalueTests
{
    private static readonly Dictionary<string, (int States, Func<int, int, double> Weight, Complex[] Eigenvalues)> Cases = new()
    {
        ["remainders"] = (9, (i, j) => (((7 * i) + (3 * j * j) + (i * j)) % 11) + 1,
        [
            new(1.0000000000000016, 0), new(0.21885019118183108, 0), new(-0.1755709593267404, 0),
            new(-0.11054132139492195, 0.10289664405016545), new(-0.11054132139492195, -0.10289664405016545), new(0.0765552834475433, 0),
            new(-0.06609881128830003, 0), new(-1.3916373603949805e-17, 0), new(-6.67093246326155e-17, 0),
        ]),
        ["ring with detours"] = (12, (i, j) => j == (i + 1) % 12 ? 6 : j == (i + 5) % 12 ? 3 : j == i ? 1 : 0,
        [
            new(1.0000000000000024, 0), new(0.10000000000000031, 0.9000000000000007), new(0.10000000000000031, -0.9000000000000007),
            new(-0.8000000000000006, 0), new(0.5500000000000004, 0.2598076211353314), new(0.5500000000000004, -0.2598076211353314),
            new(0.3598076211353316, 0.45000000000000007), new(0.3598076211353316, -0.45000000000000007),
            new(-0.15980762113533173, 0.4500000000000003), new(-0.15980762113533173, -0.4500000000000003),
            new(-0.35000000000000053, 0.2598076211353315), new(-0.35000000000000053, -0.2598076211353315),
        ]),
        ["drift"] = (10, (i, j) => j == i + 1 ? 5 : j == i - 1 ? 2 : j == 0 ? 1 : i == j ? 3 : 0,
        [
            new(0.9999999999999987, 0), new(0.7834671727589937, 0.10721150718124069), new(0.7834671727589937, -0.10721150718124069),
            new(0.46526534958537336, 0.1782751539831743), new(0.46526534958537336, -0.1782751539831743), new(-0.3355642451964337, 0),
            new(-0.22253541769505542, 0.12118577028703018), new(-0.22253541769505542, -0.12118577028703018),
            new(0.07946380582769273, 0.18785731926421476), new(0.07946380582769273, -0.18785731926421476),
        ]),
    };

    public static TheoryData<string> Names => [.. Cases.Keys];

    [Theory]
    [MemberData(nameof(Names))]
    public void Eigenvalues_are_those_of_LAPACK(string name)
    {
        var (states, weight, expected) = Cases[name];
        var moves = from i in Enumerable.Range(0, states)
                    let sum = Enumerable.Range(0, states).Sum(j => weight(i, j))
                    from j in Enumerable.Range(0, states)
                    where weight(i, j) > 0
                    select new Transition<int>(i, j, weight(i, j) / sum);

        var spectrum = Chain.FromTransitions(Enumerable.Range(0, states), moves).Spectrum();

        EigenChecks.LargestMismatch(spectrum.Eigenvalues.ToArray(), expected).Should().BeLessThan(EigenChecks.Bound(states) * states);
    }
}
