using FluentAssertions;
using Stochastic.Chains;

namespace Snippets;

internal static class Certificates
{
    public static void Read()
    {
        var pump = InventedChains.Pump;
        #region read
        Certificate proof = pump.Stationary().Certificate;

        Console.WriteLine($"Method: {proof.Method}");
        Console.WriteLine($"Reason: {proof.Reason}");
        Console.WriteLine($"Basis: {proof.Basis}, proved: {proof.IsProof}");
        Console.WriteLine($"Every share is right to twelve digits: {proof.RelativeErrorBound <= 1e-12}");
        Console.WriteLine($"Put back into the equations, they balance to fifteen: {proof.Residual <= 1e-15}");
        #endregion
    }

    public static void InATest()
    {
        var pump = InventedChains.Pump;
        #region in-a-test
        StationaryDistribution<Stage> shares = pump.Stationary();

        shares.Certificate.IsProof.Should().BeTrue();
        shares.Certificate.RelativeErrorBound.Should().BeLessThan(1e-12);
        shares[Stage.Failed].Should().BeApproximately(1.0 / 15, 1e-12);
        #endregion
    }

    public static void Require()
    {
        var pump = InventedChains.Pump;
        #region require
        double failed = pump.Stationary().Require(relativeError: 1e-12)[Stage.Failed];
        Console.WriteLine($"{failed:P4}");

        try
        {
            _ = pump.Stationary(new LinearSystemMethod()).Require(relativeError: 1e-16);
        }
        catch (AccuracyException unproved)
        {
            Console.WriteLine($"Not good enough: the {unproved.Certificate.Method}");
        }
        #endregion
    }

    public static void Structure()
    {
        var pool = InventedChains.Pool;
        #region structure
        Console.WriteLine(pool.TimeTo("lost").Mean("clean"));
        Console.WriteLine(pool.Absorption().Probability("lost", "lost"));
        Console.WriteLine(Chain.FromMatrix(new[,] { { 1.0 } }).Stationary().Certificate);
        #endregion
    }

    public static void Levels()
    {
        var pump = InventedChains.Pump;
        #region levels
        var quick = new SolveOptions { CertificateLevel = CertificateLevel.None };
        Certificate none = pump.Stationary(quick).Certificate;

        Console.WriteLine($"{none.Basis}, proved: {none.IsProof}, bound: {none.RelativeErrorBound}");
        #endregion
    }

    public static void Limits()
    {
        var pump = InventedChains.Pump;
        #region limits
        using var timeout = new CancellationTokenSource(TimeSpan.FromMinutes(1));
        var options = new SolveOptions
        {
            MemoryLimit = 10,   // bytes; absurdly small, to show the refusal
            CancellationToken = timeout.Token,
            Progress = new Progress<SolveProgress>(progress => Console.WriteLine(progress.Fraction)),
        };
        try
        {
            _ = pump.Stationary(new EliminationMethod(), options);
        }
        catch (MemoryLimitException tooLarge)
        {
            Console.WriteLine($"It would need more than {tooLarge.LimitBytes} bytes, so it was not started");
        }
        #endregion
    }
}
