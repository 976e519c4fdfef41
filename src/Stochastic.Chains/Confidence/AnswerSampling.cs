using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains.Confidence;

/// <summary>Asks answers on many drawn chains, in any order and by any number of threads, and puts them in the order of the draws.</summary>
internal sealed class AnswerSampling<TState>
    where TState : notnull
{
    private readonly ConfidenceOptions<TState> _options;
    private readonly Func<Chain<TState>, IReadOnlyList<double>> _answers;
    private readonly ChainSampler<TState> _sampler;
    private readonly StructureComparison<TState> _structure;
    private readonly double[] _estimates;
    private readonly double[][] _values;
    private readonly bool[] _differs;
    private readonly string?[] _refusals;
    private readonly Lock _reporting = new();
    private int _done;

    internal AnswerSampling(TransitionEstimate<TState> estimate, Func<Chain<TState>, IReadOnlyList<double>> answers, ConfidenceOptions<TState> options)
    {
        _options = options;
        _answers = answers;
        _sampler = new ChainSampler<TState>(estimate, options.Method, options.Seed);
        _structure = new StructureComparison<TState>(estimate.Chain);
        _estimates = [.. answers(estimate.Chain)];
        _values = Array.ConvertAll(_estimates, _ => new double[options.Draws]);
        _differs = new bool[options.Draws];
        _refusals = new string?[options.Draws];
    }

    internal IReadOnlyList<AnswerConfidence> Run()
    {
        new WorkSharing(_options.Parallelism, _options.CancellationToken).Run(_options.Draws, Ask);
        var different = _differs.Count(differs => differs);
        var refusal = Array.Find(_refusals, text => text is not null);
        return [.. _estimates.Select((estimate, k) => new AnswerConfidence(estimate, _values[k], _options.Level, different, refusal))];
    }

    private void Ask(int draw)
    {
        var chain = _sampler.Draw(draw);
        _differs[draw] = _structure.Differs(chain);
        var answers = Answer(chain, draw);
        for (var k = 0; k < _values.Length; k++)
        {
            _values[k][draw] = answers is null ? double.NaN : answers[k];
        }

        Report();
    }

    /// <summary>The answers on one chain; null where it has none.</summary>
    private IReadOnlyList<double>? Answer(Chain<TState> chain, int draw)
    {
        try
        {
            var answers = _answers(chain);
            return answers.Count == _estimates.Length ? answers : throw new InvalidOperationException(Messages.AnswersDiffer(_estimates.Length, answers.Count));
        }
        catch (Exception refusal) when (refusal is ChainStructureException or ConvergenceException or AccuracyException or NumericalRangeException)
        {
            _refusals[draw] = refusal.Message;
            return null;
        }
    }

    private void Report()
    {
        if (_options.Progress is { } progress)
        {
            lock (_reporting)
            {
                progress.Report(new SolveProgress("drawing chains", (double)++_done / _options.Draws));
            }
        }
    }
}
