namespace Stochastic.Chains.Confidence;

/// <summary>Tells whether drawn chains hang together as the estimated one: the same classes, recurrence and periods.</summary>
internal sealed class StructureComparison<TState>(Chain<TState> estimated)
    where TState : notnull
{
    private readonly ChainStructure<TState> _structure = estimated.Structure();

    internal bool Differs(Chain<TState> drawn)
    {
        if (HasSamePattern(drawn))
        {
            return false;
        }

        var classes = drawn.Structure().Classes;
        return classes.Count != _structure.Classes.Count || classes.Zip(_structure.Classes).Any(pair => !AreAlike(pair.First, pair.Second));
    }

    private static bool AreAlike(CommunicatingClass<TState> one, CommunicatingClass<TState> other) =>
        one.IsRecurrent == other.IsRecurrent && one.Period == other.Period && one.States.SequenceEqual(other.States);

    private bool HasSamePattern(Chain<TState> drawn) => drawn.TransitionCount == estimated.TransitionCount; // a drawn chain has no moves of its own
}
