using System.Diagnostics;
using System.Globalization;
using System.Runtime.InteropServices;
using ScopeReader;
using ScopeReader.Captures;
using ScopeReader.Frequency;
using ScopeReader.Harmonics;
using ScopeReader.Numerics;
using ScopeReader.Readings;
using ScopeReader.Signals;

// Usage: SpectrumSpeed make SAMPLES FILE         writes a made source, raw little-endian doubles
//        SpectrumSpeed transform LENGTH TIMES    best time of a real transform of that length, ms
//        SpectrumSpeed harmonics FILE TIMES      best time of every harmonic quantity of the file's samples, ms
const double Interval = 1e-8;
switch (args)
{
    case ["make", var samples, var file]:
        var source = new HarmonicSine { Frequency = 455.1e3, Harmonics = [new(2, -40, 30), new(3, -55, 60), new(4, -70, 90)] };
        double[] made = new Recording { Interval = Interval, Count = int.Parse(samples, CultureInfo.InvariantCulture), Noise = 1e-3 }.Samples(source.Build());
        for (int i = 0; i < made.Length; i++)
            made[i] += 1e-3 * Math.Cos(2 * Math.PI * 0.0777 * i);
        File.WriteAllBytes(file, MemoryMarshal.AsBytes<double>(made).ToArray());
        return 0;
    case ["transform", var length, var times]:
        var noise = new NormalNoise(1);
        double[] input = [.. Enumerable.Range(0, int.Parse(length, CultureInfo.InvariantCulture)).Select(_ => noise.Normal())];
        var transform = new RealTransform(input.Length);
        double[] re = new double[transform.Bins], im = new double[transform.Bins];
        Print(Best(times, () => transform.Forward(input, re, im)));
        return 0;
    case ["harmonics", var file, var times]:
        var waveform = new Waveform("made", "V", new TimeAxis(0, Interval, AxisSource.Column), MemoryMarshal.Cast<byte, double>(File.ReadAllBytes(file)).ToArray());
        var plan = new Plan { Chain = new MeasuringChain { GainTolerancePercent = 1, FlatnessDb = 0.5, Impedance = 50 } };
        ReadingSheet sheet = new();
        double milliseconds = Best(times, () =>
        {
            sheet = new ReadingSheet();
            HarmonicAnalyser.Measure(new WaveformJob(waveform, plan, new ChainErrors(plan, waveform.Axis), sheet, CancellationToken.None), InterpolatedFft.Estimate(waveform.Samples));
        });
        foreach (Reading reading in sheet.Readings)
            Console.Error.WriteLine($"{reading.Quantity} {Engineering.Format(reading.Value, reading.Budget.ExpandedUncertainty, reading.Unit)}");
        Print(milliseconds);
        return 0;
    default:
        Console.Error.WriteLine("usage: SpectrumSpeed make SAMPLES FILE, SpectrumSpeed transform LENGTH TIMES, or SpectrumSpeed harmonics FILE TIMES");
        return 64;
}

static double Best(string times, Action work)
{
    double best = double.PositiveInfinity;
    for (int i = 0; i < int.Parse(times, CultureInfo.InvariantCulture); i++)
    {
        long start = Stopwatch.GetTimestamp();
        work();
        best = Math.Min(best, Stopwatch.GetElapsedTime(start).TotalMilliseconds);
    }
    return best;
}

static void Print(double milliseconds) => Console.WriteLine(milliseconds.ToString("F3", CultureInfo.InvariantCulture));
