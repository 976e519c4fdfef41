namespace CratePool;

/// <summary>The log or the options do not allow the questions; the message says what to do.</summary>
internal sealed class UnusableLogException(string message) : Exception(message);
