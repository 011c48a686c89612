namespace ScopeReader.Numerics;

/// <summary>One period of a <see cref="HarmonicModel"/>, with its slope, read off a table.</summary>
/// <remarks>Straight lines between 64 points a cycle of the highest harmonic or more: within 0.12 % of that harmonic's amplitude.</remarks>
internal sealed class WaveTemplate
{
    private const int PointsPerHarmonic = 64, FewestPoints = 1024;

    private readonly double[] _values, _slopes;

    /// <param name="model">The period; phase 0 is its middle of the record.</param>
    public WaveTemplate(HarmonicModel model)
    {
        int points = FewestPoints;
        while (points < PointsPerHarmonic * model.Harmonics)
            points *= 2;
        double[] cosine = new double[points], sine = new double[points];
        for (int i = 0; i < points; i++)
            (cosine[i], sine[i]) = Turn.Of(1.0 / points, i);
        // One point more than a period, so that a phase of just under 1 has a neighbour.
        (_values, _slopes) = (new double[points + 1], new double[points + 1]);
        for (int k = 1; k <= model.Harmonics; k++)
        {
            double a = model.Cosines[k - 1], b = model.Sines[k - 1], turn = 2 * Math.PI * k;
            for (int i = 0, at = 0; i < points; i++, at = (at + k) & (points - 1))
            {
                _values[i] += a * cosine[at] + b * sine[at];
                _slopes[i] += turn * (b * cosine[at] - a * sine[at]);
            }
        }
        (_values[points], _slopes[points]) = (_values[0], _slopes[0]);
    }

    /// <summary>Points of the table, less the repeated one.</summary>
    public int Points => _values.Length - 1;

    /// <summary>The wave less its offset at each point.</summary>
    public ReadOnlySpan<double> Values => _values;

    /// <summary>Its change per cycle.</summary>
    public ReadOnlySpan<double> Slopes => _slopes;
}
