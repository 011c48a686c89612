namespace ScopeReader.Edges;

/// <summary>
/// The edges of one polarity laid over each other: values over the time from the 50 % instant, as points in order of time.
/// </summary>
/// <remarks>
/// Values are fractions of the step: 0 is the state before the edge, 1 the state after it, in either direction. Times are in
/// samples. A point is the mean of the samples in a cell that is much shorter than the edge, at the mean of their times, so
/// that it lies on the curve; cells without samples have no point.
/// </remarks>
public sealed class AveragedEdge
{
    private readonly double[] _times, _values, _counts;

    internal AveragedEdge(bool isRising, int edges, double[] times, double[] values, double[] counts, double noise, double codeError, double codeStep, double smear)
    {
        (IsRising, Edges, _times, _values, _counts) = (isRising, edges, times, values, counts);
        (Noise, CodeError, CodeStep, Smear) = (noise, codeError, codeStep, smear);
    }

    /// <summary>Direction of the edges.</summary>
    public bool IsRising { get; }

    /// <summary>How many edges were laid over each other.</summary>
    public int Edges { get; }

    /// <summary>Shape [points], rising: samples from the 50 % instant.</summary>
    public ReadOnlySpan<double> Times => _times;

    /// <summary>Shape [points]: fractions of the step.</summary>
    public ReadOnlySpan<double> Values => _values;

    /// <summary>Shape [points]: how many samples a point is the mean of.</summary>
    public ReadOnlySpan<double> Counts => _counts;

    /// <summary>Rms noise of one sample, of the step.</summary>
    public double Noise { get; }

    /// <summary>Rms of the converter's rounding that averaging does not remove, of the step.</summary>
    public double CodeError { get; }

    /// <summary>The converter's step, of the amplitude; 0 where none shows.</summary>
    public double CodeStep { get; }

    /// <summary>Rms of the edges' distances from where they were laid, samples: it broadens the edge.</summary>
    public double Smear { get; }

    /// <summary>Variance of a point, of the step squared; never 0, so that it can weigh.</summary>
    internal double Variance(int point) => Noise * Noise / _counts[point] + CodeError * CodeError + 1e-24;

    /// <summary>Index of the first point at or after a time; the number of points if there is none.</summary>
    internal int IndexAt(double time)
    {
        int index = _times.AsSpan().BinarySearch(time);
        return index < 0 ? ~index : index;
    }

    internal AveragedEdge Shifted(double origin)
    {
        double[] times = Array.ConvertAll(_times, t => t - origin);
        return new AveragedEdge(IsRising, Edges, times, _values, _counts, Noise, CodeError, CodeStep, Smear);
    }
}
