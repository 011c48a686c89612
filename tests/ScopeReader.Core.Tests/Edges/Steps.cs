using System.Numerics;
using MathNet.Numerics;
using ScopeReader.Captures;
using ScopeReader.Edges;
using ScopeReader.Levels;
using ScopeReader.Readings;

namespace ScopeReader.Tests.Edges;

/// <summary>Step responses in closed form, and the way to have one measured.</summary>
internal static class Steps
{
    public static readonly StateLevels Unit = new(0, 1, 0, 0, 0);

    /// <summary>Unit step through the poles of a low-pass: 1 + Σ r e^(pt), by partial fractions.</summary>
    public static Func<double, double> Of(params Complex[] poles)
    {
        Complex[] residues = [.. poles.Select((p, i) => poles.Aggregate(Complex.One, (product, q) => product * -q)
            / (p * poles.Where((_, j) => j != i).Aggregate(Complex.One, (product, q) => product * (p - q))))];
        return t => t < 0 ? 0 : 1 + poles.Select((p, i) => residues[i] * Complex.Exp(p * t)).Aggregate(Complex.Zero, Complex.Add).Real;
    }

    /// <summary>Poles of a maximally flat low-pass with its -3 dB point at 1 rad/s.</summary>
    public static Complex[] Butterworth(int order) =>
        [.. Enumerable.Range(0, order).Select(k => Complex.FromPolarCoordinates(1, Math.PI * (order + 1 + 2 * k) / (2 * order)))];

    /// <summary>Poles of the four-pole Bessel low-pass, s⁴ + 10s³ + 45s² + 105s + 105, and its -3 dB point, rad/s.</summary>
    public static (Complex[] Poles, double Corner) Bessel4()
    {
        Complex[] poles = FindRoots.Polynomial([105, 105, 45, 10, 1]);
        double Gain(double w) => 105 / poles.Aggregate(Complex.One, (product, p) => product * (new Complex(0, w) - p)).Magnitude;
        return (poles, FindRoots.OfFunction(w => Gain(w) - Math.Sqrt(0.5), 1, 4, 1e-14));
    }

    /// <summary>A record of a step: so many seconds before it, so many after.</summary>
    public static Waveform Record(Func<double, double> step, double interval, double before, double after, double shift = 0)
    {
        int first = (int)Math.Round(before / interval), count = first + (int)Math.Round(after / interval);
        double[] samples = [.. Enumerable.Range(0, count).Select(i => step((i - first + shift) * interval))];
        return new Waveform("step", "V", new TimeAxis(-before, interval, AxisSource.Preamble), samples);
    }

    /// <summary>Measures a record of which the state levels are known.</summary>
    public static (ReadingSheet Sheet, IReadOnlyList<MeasuredEdge> Edges) Measure(Waveform waveform, StateLevels? levels = null, Plan? plan = null)
    {
        var sheet = new ReadingSheet();
        StateLevels states = levels ?? Unit;
        var job = new WaveformJob(waveform, plan ?? Plan.Empty, new ChainErrors(plan ?? Plan.Empty, waveform.Axis), sheet, default);
        IReadOnlyList<Transition> transitions = Transitions.Find(waveform.Samples, states.Low, states.High, states.Noise);
        return (sheet, EdgeAnalyser.Measure(job, states, 0, transitions, null));
    }

    public static double Value(this ReadingSheet sheet, Quantity quantity) =>
        sheet.Primary(quantity)?.Value ?? throw new InvalidOperationException($"{quantity}: {sheet.NotMeasured.FirstOrDefault(n => n.Quantity == quantity)?.Reason}");
}
