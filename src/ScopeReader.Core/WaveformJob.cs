using ScopeReader.Captures;
using ScopeReader.Readings;

namespace ScopeReader;

/// <summary>What every analyser of a waveform works with.</summary>
/// <param name="Waveform">The waveform.</param>
/// <param name="Plan">The plan: reference levels, nominal, chain.</param>
/// <param name="Chain">Adds the chain's terms to a reading.</param>
/// <param name="Sheet">Where readings, reasons and findings go.</param>
/// <param name="Cancellation">Stops long work.</param>
public sealed record WaveformJob(Waveform Waveform, Plan Plan, ChainErrors Chain, ReadingSheet Sheet, CancellationToken Cancellation)
{
    /// <summary>What earlier stages found out about the record as a whole.</summary>
    public WaveFitness Fitness { get; init; } = WaveFitness.Unknown;
}
