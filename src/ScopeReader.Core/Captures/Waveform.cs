namespace ScopeReader.Captures;

/// <summary>Equally spaced samples of one channel.</summary>
public sealed class Waveform : Channel
{
    private readonly ReadOnlyMemory<double> _samples;

    /// <summary>Takes the samples over without a copy: the caller lets go of them.</summary>
    /// <param name="name">The channel's name.</param>
    /// <param name="unit">Unit of the samples, without prefix.</param>
    /// <param name="axis">When they were taken.</param>
    /// <param name="samples">Shape [n], n of 1 or more, each finite.</param>
    /// <param name="segment">Number of the segment, from 1.</param>
    /// <exception cref="ArgumentException">No samples, or one that is not finite.</exception>
    public Waveform(string name, string unit, TimeAxis axis, double[] samples, int segment = 1)
        : this(name, unit, axis, new ReadOnlyMemory<double>(samples ?? throw new ArgumentNullException(nameof(samples))), segment)
    {
    }

    /// <summary>Takes over part of a larger array, for samples that were read into more room than they needed.</summary>
    /// <inheritdoc cref="Waveform(string, string, TimeAxis, double[], int)"/>
    public Waveform(string name, string unit, TimeAxis axis, ReadOnlyMemory<double> samples, int segment = 1) : base(name, unit, segment)
    {
        ArgumentNullException.ThrowIfNull(axis);
        if (samples.Length == 0)
            throw new ArgumentException("a waveform has at least one sample", nameof(samples));
        foreach (double v in samples.Span)
            if (!double.IsFinite(v))
                throw new ArgumentException("a waveform's samples are finite", nameof(samples));
        (Axis, _samples) = (axis, samples);
    }

    /// <summary>When the samples were taken.</summary>
    public TimeAxis Axis { get; }

    /// <summary>The samples, in <see cref="Channel.Unit"/>.</summary>
    public ReadOnlySpan<double> Samples => _samples.Span;

    /// <summary>The same, to be shared among threads.</summary>
    public ReadOnlyMemory<double> Memory => _samples;

    /// <summary>Sample interval, s, or 1 where none is known.</summary>
    public double Interval => Axis.Interval;

    /// <inheritdoc/>
    public override int Count => _samples.Length;
}
