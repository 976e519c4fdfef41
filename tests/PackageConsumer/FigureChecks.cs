namespace PackageConsumer;

/// <summary>Compares figures with those worked out by hand, and remembers whether all were right.</summary>
internal sealed class FigureChecks
{
    private const double LargestRelativeError = 1e-12;

    private int _right;
    private int _wrong;

    internal void Figure(string name, double actual, double expected) =>
        Record(Math.Abs(actual - expected) <= LargestRelativeError * Math.Abs(expected), $"{name}: {actual:R}, by hand {expected:R}");

    internal void Holds(string name, bool isTrue) => Record(isTrue, name);

    /// <summary>Prints the count; the exit code is 0 only when something was checked and nothing was wrong.</summary>
    internal int Close()
    {
        Console.WriteLine($"{_right} figures right, {_wrong} wrong");
        return _right > 0 && _wrong == 0 ? 0 : 1;
    }

    private void Record(bool isRight, string text)
    {
        Console.WriteLine($"{(isRight ? "right" : "WRONG")}  {text}");
        if (isRight)
        {
            _right++;
        }
        else
        {
            _wrong++;
        }
    }
}
