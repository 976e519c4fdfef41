namespace Stochastic.Chains.Kernels;

/// <summary>
/// The reflector P = I − β v vᵀ, v₀ = 1, that turns a vector into a multiple of the first unit vector (Golub and Van Loan, Matrix
/// Computations, 4th ed. 2013, section 5.1). P is orthogonal and its own inverse.
/// </summary>
internal static class HouseholderReflector
{
    private const int SafeExponent = 450;

    /// <summary>
    /// Overwrites x by v and returns β; image is the number with P x = image · e₀. β is 0, and P the identity, where the tail of x
    /// is zero already. Entries far below the largest may be lost, none overflows. O(length).
    /// </summary>
    internal static double Form(Span<double> x, out double image)
    {
        var largest = 0.0;
        foreach (var entry in x[1..])
        {
            largest = Math.Max(largest, Math.Abs(entry));
        }

        var head = x[0];
        x[0] = 1;
        if (largest == 0)
        {
            image = head;
            return 0;
        }

        var exponent = Math.ILogB(Math.Max(largest, Math.Abs(head)));
        var shift = Math.Abs(exponent) > SafeExponent ? -exponent : 0;
        if (shift != 0)
        {
            head = Math.ScaleB(head, shift);
            foreach (ref var entry in x[1..])
            {
                entry = Math.ScaleB(entry, shift);
            }
        }

        var tail = x[1..];
        // The sign opposite to the head's: the difference then adds magnitudes and loses nothing.
        var length = -Math.CopySign(Math.Sqrt((head * head) + VectorLoops.Dot(tail, tail)), head);
        var difference = head - length;
        VectorLoops.Divide(tail, difference, tail);
        image = shift == 0 ? length : Math.ScaleB(length, -shift);
        return -difference / length;
    }
}
