using ScopeReader.Captures;
using ScopeReader.Frequency;
using ScopeReader.Harmonics;
using ScopeReader.Readings;
using ScopeReader.Signals;

namespace ScopeReader.Tests.Harmonics;

public class HarmonicUncertaintyTests
{
    private const int Records = 200, Count = 5000;

    [Theory]
    [InlineData(12)]
    [InlineData(8)]
    public void Stated_uncertainty_is_what_repeated_records_scatter(int bits)
    {
        // Fundamental at 90 % of full scale, noise of half a step, lines of -40, -50 and -60 dBc: what every quantity here is held to is
        // mean u over scatter within 0.8 to 1.3 and 91 to 99 % of intervals holding the truth. 200 records give the scatter to 5 %;
        // at 8 bits the line of -60 dBc has 8 standard uncertainties, so its decibels are still nearly linear.
        Dictionary<string, double> truth = new() { ["harmonic-2"] = -40, ["harmonic-3"] = -50, ["harmonic-4"] = -60 };
        var squares = truth.Keys.ToDictionary(k => k, _ => 0.0);
        var stated = truth.Keys.ToDictionary(k => k, _ => 0.0);
        var held = truth.Keys.ToDictionary(k => k, _ => 0);
        for (ulong seed = 1; seed <= Records; seed++)
        {
            ReadingSheet sheet = Measure(bits, seed);
            foreach ((string id, double level) in truth)
            {
                Reading reading = sheet.Readings.Single(r => r.Quantity.Id == id);
                double off = reading.Value - level;
                squares[id] += off * off / Records;
                stated[id] += reading.Budget.StandardUncertainty / Records;
                held[id] += Math.Abs(off) <= reading.Budget.ExpandedUncertainty ? 1 : 0;
            }
        }
        foreach (string id in truth.Keys)
        {
            Assert.InRange(stated[id] / Math.Sqrt(squares[id]), 0.8, 1.3);
            Assert.InRange(held[id], 0.91 * Records, 0.99 * Records);
        }
    }

    [Fact]
    public void Line_of_a_sine_without_noise_is_hidden_by_the_converters_steps()
    {
        // 8 bits, no noise: the steps' own lines are some 0.157 q/√(A/q) strong, -77 dBc; a line of -85 dBc cannot be told from them.
        ReadingSheet sheet = Measure(8, 1, noise: 0, levels: [-85, -85, -85]);
        Assert.Contains(sheet.NotMeasured, n => n.Quantity.Id.StartsWith("harmonic-", StringComparison.Ordinal) && n.Code == "quantisation"
            && n.Reason.Contains("converter's steps", StringComparison.Ordinal));
    }

    private static ReadingSheet Measure(int bits, ulong seed, double noise = 0.5, double[]? levels = null)
    {
        var draw = new NormalNoise(seed);
        var converter = new Converter(bits, -1 / 0.9, 1 / 0.9);
        double frequency = 0.0123 * (1 + 0.01 * draw.Uniform());
        double[] dbc = levels ?? [-40, -50, -60];
        var sine = new HarmonicSine { Frequency = frequency, Harmonics = [.. dbc.Select((v, i) => new HarmonicLine(i + 2, v, draw.Uniform(0, 360)))] };
        Waveform waveform = new Recording
        {
            Interval = 1,
            Count = Count,
            Delay = draw.Uniform(0, 80),
            Noise = noise * converter.Step,
            Seed = seed + 1000,
            Converter = converter,
        }.Take(sine.Build());
        var plan = new Plan { Chain = new MeasuringChain { GainTolerancePercent = 0, FlatnessDb = 0 } };
        var sheet = new ReadingSheet();
        FrequencyEstimate estimate = SineFit.Estimate(waveform.Samples, frequency)!;
        HarmonicAnalyser.Measure(new WaveformJob(waveform, plan, new ChainErrors(plan, waveform.Axis), sheet, CancellationToken.None), estimate);
        return sheet;
    }
}
