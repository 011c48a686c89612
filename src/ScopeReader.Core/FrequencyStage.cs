using ScopeReader.Edges;
using ScopeReader.Frequency;
using ScopeReader.Levels;

namespace ScopeReader;

/// <summary>What the first stages found, for the later ones: edges, ringing, harmonics.</summary>
/// <param name="Job">The job, with what is known of the record's fitness.</param>
/// <param name="Shape">What kind of wave it is.</param>
/// <param name="States">Its states; null where it has none.</param>
/// <param name="Transitions">Its transitions, in order.</param>
/// <param name="Frequency">Its frequency; null where it has none.</param>
public sealed record FrequencyStage(WaveformJob Job, WaveShape Shape, StateLevels? States, IReadOnlyList<Transition> Transitions, MeasuredFrequency? Frequency);
