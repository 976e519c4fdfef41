namespace Stochastic.Chains.Tests.Support;

/// <summary>Long-run answers.</summary>
internal sealed partial class ExactChain
{
    /// <summary>The stationary distribution of a chain with one recurrent class, over all states: zero on transient ones.</summary>
    public Rational[] Stationary() => Structure.RecurrentClasses.Count == 1
        ? Stationary(Structure.RecurrentClasses[0])
        : throw new InvalidOperationException($"{Structure.RecurrentClasses.Count} recurrent classes: ask for one of them.");

    /// <summary>The stationary distribution of one recurrent class, over all states: zero outside the class.</summary>
    public Rational[] Stationary(ReferenceClass recurrent)
    {
        var result = new Rational[StateCount];
        var reference = recurrent.States[^1];
        if (recurrent.States.Length == 1)
        {
            result[reference] = 1;
            return result;
        }

        var system = new ExactSystem(this, recurrent.States[..^1]);
        var minors = ResidueNumbers.Find(
            system.DeterminantBits + _rows[reference].Outflow.GetBitLength(),
            field => Minors(field, system, system.Factor(field), reference));
        var weights = recurrent.States.Select((state, i) => minors[i] * _rows[state].Scale).ToArray();
        var total = weights.Aggregate((sum, weight) => sum + weight);
        for (var i = 0; i < weights.Length; i++)
        {
            result[recurrent.States[i]] = new(weights[i], total);
        }

        return result;
    }

    /// <summary>1/pi in a recurrent state, null (never certain to return) in a transient one.</summary>
    public Rational? MeanRecurrence(int state)
    {
        var home = Structure.Classes[Structure.ClassOf[state]];
        return home.IsClosed ? 1 / Stationary(home)[state] : null;
    }

    /// <summary>
    /// For each state of the class the determinant of S (D - A) without it, which is the stationary weight over the row scale (Markov
    /// chain tree theorem); the reference state comes last.
    /// </summary>
    private ulong[] Minors(PrimeField field, ExactSystem system, ResidueFactors factors, int reference)
    {
        var inflow = new ulong[system.States.Length];
        foreach (var move in _rows[reference].Moves)
        {
            inflow[system.PositionOf(move.To)] = field.Multiply(move.Amount.In(field), factors.Determinant);
        }

        return [.. factors.SolveLeft(inflow), factors.Determinant];
    }
}
