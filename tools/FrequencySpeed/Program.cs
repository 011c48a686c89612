using System.Diagnostics;
using System.Globalization;
using System.Runtime.InteropServices;
using ScopeReader;
using ScopeReader.Captures;
using ScopeReader.Readings;
using ScopeReader.Signals;

// Times every frequency quantity of 10 million samples at 20 per period, and leaves the samples for another program to be timed on.
const int Count = 10_000_000, Repeats = 5;
const double SamplesPerCycle = 20.0173;
if (args is not [var folder])
{
    Console.Error.WriteLine("expected a folder for the samples");
    return 64;
}
PeriodicSignal sine = new HarmonicSine { Frequency = 1 / SamplesPerCycle }.Build(), square = new SquareWave { Frequency = 1 / SamplesPerCycle, RiseTime = 3 }.Signal;
foreach ((string name, PeriodicSignal signal) in new[] { ("sine", sine), ("square", square) })
{
    Waveform waveform = new Recording { Interval = 1, Count = Count, Noise = 0.01 }.Take(signal);
    using (FileStream file = File.Create(Path.Combine(folder, name + ".f64")))
        file.Write(MemoryMarshal.AsBytes(waveform.Samples));
    double best = double.PositiveInfinity;
    Reading? reading = null;
    for (int i = 0; i < Repeats; i++)
    {
        var sheet = new ReadingSheet();
        var watch = Stopwatch.StartNew();
        WaveformAnalysis.MeasureFrequency(new WaveformJob(waveform, Plan.Empty, new ChainErrors(Plan.Empty, waveform.Axis), sheet, default));
        best = Math.Min(best, watch.Elapsed.TotalSeconds);
        reading = sheet.Primary(Quantities.Frequency);
    }
    Console.WriteLine(string.Create(CultureInfo.InvariantCulture, $"{name} {best:0.000} {reading!.Value:R} {reading.Method}"));
}
return 0;
