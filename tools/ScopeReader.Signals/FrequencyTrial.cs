using System.Numerics;
using ScopeReader.Captures;
using ScopeReader.Readings;

namespace ScopeReader.Signals;

/// <summary>A periodic wave in white noise, measured again and again by the frequency chain alone, against what no unbiased estimator beats.</summary>
/// <remarks>
/// Cramér-Rao bound of a periodic wave: u(f) = √(12σ²/(N(N² - 1)·⟨s'²⟩)) cycles per sample, ⟨s'²⟩ = 2π²Σk²A_k² per cycle²; of a
/// sine √(6σ²/(π²A²N(N² - 1))) (Rife and Boorstyn 1974, real form; from memory). Every run draws its start phase and its noise.
/// </remarks>
public sealed class FrequencyTrial
{
    private readonly PeriodicSignal _signal;
    private readonly double _noise;
    private readonly int _count;

    /// <param name="signal">The wave; its frequency in cycles per sample.</param>
    /// <param name="count">Samples a run.</param>
    /// <param name="noise">White noise, rms.</param>
    public FrequencyTrial(PeriodicSignal signal, int count, double noise)
    {
        ArgumentNullException.ThrowIfNull(signal);
        (_signal, _count, _noise) = (signal, count, noise);
        double slope = 0, n = count;
        for (int k = 1; k < signal.Series.Coefficients.Length; k++)
            slope += 2 * Math.PI * Math.PI * k * k * signal.Series.Amplitude(k) * signal.Series.Amplitude(k);
        Bound = Math.Sqrt(12 * noise * noise / (n * (n * n - 1) * slope));
    }

    /// <summary>The bound of the frequency's standard deviation, cycles per sample.</summary>
    public double Bound { get; }

    /// <summary>A sine of amplitude 1 so many decibels above the noise: η = A²/(2σ²).</summary>
    public static FrequencyTrial Sine(double samplesPerCycle, int count, double decibels) =>
        new(new HarmonicSine { Frequency = 1 / samplesPerCycle }.Build(), count, Math.Sqrt(0.5) * Math.Pow(10, -decibels / 20));

    /// <summary>A square wave of ±1 with Gaussian edges, band-limited to half the sample rate; its noise is that of a sine of amplitude 1.</summary>
    public static FrequencyTrial Square(double samplesPerCycle, double edge, int count, double decibels)
    {
        ReadOnlySpan<Complex> all = new SquareWave { Frequency = 1 / samplesPerCycle, Low = -1, High = 1, RiseTime = edge }.Signal.Series.Coefficients;
        Complex[] passed = all[..Math.Min(all.Length, (int)Math.Ceiling(samplesPerCycle / 2))].ToArray();
        return new(new PeriodicSignal(1 / samplesPerCycle, new FourierSeries(passed), edge / SquareWave.RiseTimeOverSigma / samplesPerCycle), count, Math.Sqrt(0.5) * Math.Pow(10, -decibels / 20));
    }

    /// <summary>Runs it.</summary>
    /// <param name="runs">How often.</param>
    /// <param name="first">Seed of the first run.</param>
    public FrequencyTally Run(int runs, ulong first = 1)
    {
        var estimates = new (double Error, double Stated, bool Covered, string Method)?[runs];
        Parallel.For(0, runs, i => estimates[i] = Once(first + (ulong)i));
        return new FrequencyTally(Bound, estimates);
    }

    private (double, double, bool, string)? Once(ulong seed)
    {
        var draw = new NormalNoise(seed);
        double delay = draw.Uniform() / _signal.Frequency;
        Waveform waveform = new Recording { Interval = 1, Count = _count, Noise = _noise, Delay = delay, Seed = (ulong)(1e15 * draw.Uniform()) }.Take(_signal);
        // The chain is exact: what is left is the capture's own part.
        var plan = new Plan { Chain = new MeasuringChain { TimebaseTolerancePpm = 0 } };
        var job = new WaveformJob(waveform, plan, new ChainErrors(plan, waveform.Axis), new ReadingSheet(), default);
        if (WaveformAnalysis.MeasureFrequency(job).Frequency is not { Primary: { } primary })
            return null;
        var budget = new Budget(primary.Terms);
        double error = primary.CyclesPerSample - _signal.Frequency;
        return (error, budget.StandardUncertainty, Math.Abs(error) <= budget.ExpandedUncertainty, primary.Method);
    }
}
