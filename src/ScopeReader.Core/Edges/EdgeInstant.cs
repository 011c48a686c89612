namespace ScopeReader.Edges;

/// <summary>How well a 50 % instant is known.</summary>
/// <param name="Noise">Standard uncertainty from noise and rounding, samples.</param>
/// <param name="Slope">Slope there, of the step per sample: either state moves the instant by half of its own error over this.</param>
internal readonly record struct EdgeInstant(double Noise, double Slope);
