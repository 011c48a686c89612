using ScopeReader.Edges;

namespace ScopeReader.Ringing;

/// <summary>A stretch of an averaged edge after the transition, with the variance of each point.</summary>
internal sealed class RingingWindow
{
    private readonly double[] _times, _values, _variances;

    /// <param name="times">Shape [points], rising.</param>
    /// <param name="values">Shape [points].</param>
    /// <param name="variances">Shape [points], above 0.</param>
    public RingingWindow(double[] times, double[] values, double[] variances) => (_times, _values, _variances) = (times, values, variances);

    /// <summary>Shape [points]: samples from the 50 % instant.</summary>
    public ReadOnlySpan<double> Times => _times;

    /// <summary>Shape [points]: of the step, less 1.</summary>
    public ReadOnlySpan<double> Values => _values;

    /// <summary>Shape [points].</summary>
    public ReadOnlySpan<double> Variances => _variances;

    /// <summary>The points of an averaged edge from one time to another, gathered into wider cells where there are too many.</summary>
    /// <param name="edge">The averaged edge.</param>
    /// <param name="from">Samples from the 50 % instant.</param>
    /// <param name="to">Samples from the 50 % instant.</param>
    /// <param name="most">About how many points to keep.</param>
    public static RingingWindow Of(AveragedEdge edge, double from, double to, int most)
    {
        int first = edge.IndexAt(from), end = edge.IndexAt(to), together = Math.Max(1, (end - first + most - 1) / most);
        int n = Math.Max(0, (end - first) / together);
        double[] times = new double[n], values = new double[n], variances = new double[n];
        for (int k = 0; k < n; k++)
        {
            double weights = 0;
            for (int i = first + k * together; i < first + (k + 1) * together; i++)
            {
                double weight = 1 / edge.Variance(i);
                weights += weight;
                times[k] += weight * edge.Times[i];
                values[k] += weight * (edge.Values[i] - 1);
            }
            (times[k], values[k], variances[k]) = (times[k] / weights, values[k] / weights, 1 / weights);
        }
        return new RingingWindow(times, values, variances);
    }

    /// <summary>Fits a damped sinusoid from a start.</summary>
    public DampedSinusoidFit? Fit(double frequency, double decay) => DampedSinusoidFit.From(_times, _values, _variances, frequency, decay);

    /// <summary>Fits several damped sinusoids from their starts.</summary>
    public DampedSinusoidFit? Fit(ReadOnlySpan<(double Frequency, double Decay)> starts) => DampedSinusoidFit.From(_times, _values, _variances, starts);

    /// <summary>The same points with a fit taken off.</summary>
    public RingingWindow Less(DampedSinusoidFit fit)
    {
        double[] rest = new double[_values.Length];
        for (int i = 0; i < rest.Length; i++)
            rest[i] = _values[i] - fit.At(_times[i] - _times[0]);
        return new RingingWindow(_times, rest, _variances);
    }

    /// <summary>Means over so many stretches of equal length, or as many as there are points; none where a stretch holds no point.</summary>
    public double[] Evenly(int most)
    {
        int n = Math.Min(most, _times.Length);
        double[] means = new double[n], weights = new double[n];
        double span = _times[^1] - _times[0], stretch = span / Math.Max(1, n - 1);
        for (int i = 0; i < _times.Length; i++)
        {
            // Points at even distances lie in the middles of their stretches.
            int k = Math.Min(n - 1, (int)((_times[i] - _times[0]) / stretch + 0.5));
            means[k] += _values[i] / _variances[i];
            weights[k] += 1 / _variances[i];
        }
        for (int k = 0; k < n; k++)
        {
            if (weights[k] == 0)
                return [];
            means[k] /= weights[k];
        }
        return means;
    }

    /// <summary>Smallest sum of squared residuals, each over its variance, of what does not ring: a level with a slope, or an exponential.</summary>
    /// <returns>The sum and the number of unknowns.</returns>
    public (double ChiSquare, int Unknowns) WithoutRinging()
    {
        double span = _times[^1] - _times[0];
        (double ChiSquare, int Unknowns) best = (ChiSquareOf(t => t), 2);
        // Time constants from a hundredth of the window to twice it.
        for (int k = 0; k <= 24; k++)
        {
            double decay = 100 / span * Math.Pow(200, -k / 24.0), chiSquare = ChiSquareOf(t => Math.Exp(-decay * t));
            if (chiSquare < best.ChiSquare)
                best = (chiSquare, 3);
        }
        return best;
    }

    private double ChiSquareOf(Func<double, double> shape)
    {
        double w = 0, x = 0, y = 0, xx = 0, xy = 0, yy = 0;
        for (int i = 0; i < _times.Length; i++)
        {
            double weight = 1 / _variances[i], s = shape(_times[i] - _times[0]), v = _values[i];
            (w, x, y) = (w + weight, x + weight * s, y + weight * v);
            (xx, xy, yy) = (xx + weight * s * s, xy + weight * s * v, yy + weight * v * v);
        }
        double determinant = xx - x * x / w, slope = determinant > 0 ? (xy - x * y / w) / determinant : 0;
        return Math.Max(0, yy - y * y / w - slope * (xy - x * y / w));
    }
}
