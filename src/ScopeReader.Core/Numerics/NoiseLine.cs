namespace ScopeReader.Numerics;

/// <summary>A line that stands out of noise.</summary>
/// <param name="Frequency">Cycles per sample.</param>
/// <param name="FrequencyUncertainty">Its standard uncertainty.</param>
/// <param name="Amplitude">Peak, what noise adds on average taken off.</param>
/// <param name="Uncertainty">Standard uncertainty of the amplitude.</param>
public sealed record NoiseLine(double Frequency, double FrequencyUncertainty, double Amplitude, double Uncertainty);
