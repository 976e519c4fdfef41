namespace Stochastic.Chains;

/// <summary>A result that carries the evidence of its own accuracy.</summary>
public interface ICertified
{
    /// <summary>Gets how the result was computed and how far it can be off.</summary>
    Certificate Certificate { get; }
}
