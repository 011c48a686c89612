namespace ScopeReader.Frequency;

/// <summary>Where the regression puts the 50 % instants of a periodic waveform; all in samples from the first sample.</summary>
/// <param name="Period">The period, samples.</param>
/// <param name="PeriodUncertainty">Its standard uncertainty, the capture's own part.</param>
/// <param name="RisingOrigin">Rising edges lie at RisingOrigin + k·Period; null without rising edges.</param>
/// <param name="FallingOrigin">Falling edges lie at FallingOrigin + k·Period; null without falling edges.</param>
/// <param name="TimingSpread">Rms distance of the edges from the grid: noise and jitter of one edge.</param>
public sealed record PeriodGrid(double Period, double PeriodUncertainty, double? RisingOrigin, double? FallingOrigin, double TimingSpread);
