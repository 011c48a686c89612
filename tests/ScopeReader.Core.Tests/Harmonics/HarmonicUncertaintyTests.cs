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
        double step = 2 / 0.9 / (1 << bits), noise = step * step * (0.25 + 1.0 / 12), lines = (1e-4 + 1e-5 + 1e-6) / 2;
        Dictionary<string, double> truth = new()
        {
            ["harmonic-2"] = -40,
            ["harmonic-3"] = -50,
            ["harmonic-4"] = -60,
            ["thd"] = 100 * Math.Sqrt(2 * lines),
            ["sinad"] = 10 * Math.Log10(0.5 / (noise + lines)),
            ["sfdr"] = 40,
            ["noise-floor"] = 10 * Math.Log10(2 * noise / 0.5),
        };
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

    [Theory]
    [InlineData(8, 0.6153)]
    [InlineData(12, 0.03846)]
    public void Line_of_minus_70_dBc_is_known_as_well_as_noise_and_rounding_allow(int bits, double expected)
    {
        // Closed form: σ² = (0.25 + 1/12) steps², u(A) = σ√(2/N), A = 0.9·2^(bits - 1)·10^(-3.5) steps, 8.686 u(A)/A dB. The density is
        // good to 7 % and the fitted level to its u: the mean of 50 to 5 %. 50 intervals hold the truth 44 times or more in 99.7 % of tries.
        int held = 0;
        double stated = 0;
        const int records = 50;
        for (ulong seed = 1; seed <= records; seed++)
        {
            Reading reading = Measure(bits, seed, levels: [-40, -55, -70], count: 100_000).Readings.Single(r => r.Quantity.Id == "harmonic-4");
            held += Math.Abs(reading.Value + 70) <= reading.Budget.ExpandedUncertainty ? 1 : 0;
            stated += reading.Budget.StandardUncertainty / records;
        }
        Assert.Equal(expected, stated, 0.05 * expected);
        Assert.InRange(held, 44, records);
    }

    [Theory]
    [InlineData(8)]
    [InlineData(12)]
    public void Weak_line_without_noise_is_not_resolved_from_the_steps(int bits)
    {
        // -70 dBc is 0.036 and 0.58 steps: under the 2/π that rounding alone may make.
        NotMeasured reason = Measure(bits, 1, noise: 0, levels: [-40, -55, -70], count: 100_000).NotMeasured.Single(n => n.Quantity.Id == "harmonic-4");
        Assert.Equal("quantisation", reason.Code);
        Assert.Contains("dBc: not resolved: quantisation", reason.Reason, StringComparison.Ordinal);
    }

    [Fact]
    public void Distortion_of_a_pure_sine_is_never_a_number()
    {
        for (ulong seed = 1; seed <= Records; seed++)
        {
            ReadingSheet sheet = Measure(8, seed, levels: []);
            Assert.DoesNotContain(sheet.Readings, r => r.Quantity == Quantities.Thd || r.Quantity == Quantities.WorstHarmonic || r.Quantity == Quantities.Sfdr);
            // Noise of nine harmonics is 2·9 u²; what is stated lies above it.
            Assert.True(sheet.NotMeasured.Single(n => n.Quantity == Quantities.Thd).AtMost > 0);
        }
    }

    private static ReadingSheet Measure(int bits, ulong seed, double noise = 0.5, double[]? levels = null, int count = Count)
    {
        var draw = new NormalNoise(seed);
        var converter = new Converter(bits, -1 / 0.9, 1 / 0.9);
        double frequency = 0.0123 * (1 + 0.01 * draw.Uniform());
        double[] dbc = levels ?? [-40, -50, -60];
        var sine = new HarmonicSine { Frequency = frequency, Harmonics = [.. dbc.Select((v, i) => new HarmonicLine(i + 2, v, draw.Uniform(0, 360)))] };
        Waveform waveform = new Recording
        {
            Interval = 1,
            Count = count,
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
