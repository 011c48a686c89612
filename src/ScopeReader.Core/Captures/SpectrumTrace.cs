namespace ScopeReader.Captures;

/// <summary>Levels over frequency as saved by a spectrum analyser.</summary>
public sealed class SpectrumTrace : Channel
{
    private readonly double[] _frequencies, _levels;

    /// <summary>Takes the points over without a copy.</summary>
    /// <param name="name">The trace's name.</param>
    /// <param name="unit">Unit of the levels: dBm, dBV, dBµV, V or W.</param>
    /// <param name="frequencies">Shape [n], Hz, strictly rising, n of 3 or more.</param>
    /// <param name="levels">Shape [n], in <paramref name="unit"/>, each finite.</param>
    /// <param name="resolutionBandwidth">-3 dB width of the resolution filter, Hz, where the file or the person states it.</param>
    /// <param name="source">Where the axis was found.</param>
    /// <param name="segment">Number of the table in the file, from 1.</param>
    /// <exception cref="ArgumentException">Lengths differ, under three points, not finite or not rising.</exception>
    public SpectrumTrace(string name, string unit, double[] frequencies, double[] levels, double? resolutionBandwidth = null,
        AxisSource source = AxisSource.Column, int segment = 1) : base(name, unit, segment)
    {
        ArgumentNullException.ThrowIfNull(frequencies);
        ArgumentNullException.ThrowIfNull(levels);
        if (frequencies.Length != levels.Length || levels.Length < 3)
            throw new ArgumentException("a spectrum trace has three points or more, each with a frequency", nameof(levels));
        for (int i = 0; i < levels.Length; i++)
            if (!double.IsFinite(levels[i]) || !double.IsFinite(frequencies[i]) || (i > 0 && frequencies[i] <= frequencies[i - 1]))
                throw new ArgumentException("a spectrum trace's points are finite and its frequencies rise", nameof(frequencies));
        (_frequencies, _levels, ResolutionBandwidth, Source) = (frequencies, levels, resolutionBandwidth, source);
    }

    /// <summary>Frequencies of the points, Hz, strictly rising.</summary>
    public ReadOnlySpan<double> Frequencies => _frequencies;

    /// <summary>Distance of the points, Hz, where they lie within a hundredth of it of an even grid (files print them rounded); otherwise null.</summary>
    public double? EvenStep
    {
        get
        {
            double step = (_frequencies[^1] - _frequencies[0]) / (_frequencies.Length - 1);
            for (int i = 0; i < _frequencies.Length; i++)
                if (Math.Abs(_frequencies[i] - (_frequencies[0] + i * step)) > 0.01 * step)
                    return null;
            return step;
        }
    }

    /// <summary>Levels of the points, in <see cref="Channel.Unit"/>.</summary>
    public ReadOnlySpan<double> Levels => _levels;

    /// <summary>-3 dB width of the resolution filter, Hz; null where unknown.</summary>
    public double? ResolutionBandwidth { get; }

    /// <summary>What the trace averages, where the file states it.</summary>
    public TraceAveraging Averaging { get; init; }

    /// <summary>Where the frequency axis was found.</summary>
    public AxisSource Source { get; }

    /// <inheritdoc/>
    public override int Count => _levels.Length;
}
