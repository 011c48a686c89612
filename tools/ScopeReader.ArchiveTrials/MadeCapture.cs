using System.Globalization;
using System.Security.Cryptography;
using System.Text;
using ScopeReader.Archive;
using ScopeReader.Captures;
using ScopeReader.Limits;
using ScopeReader.Readings;

namespace ScopeReader.ArchiveTrials;

/// <summary>Captures made from a seed, for filling archives: an 8-bit square wave, its text, and readings about its truth.</summary>
public static class MadeCapture
{
    private const double Step = 0.04, Interval = 1e-8, Nominal = 455e3;

    private static readonly Quantity[] Measured =
    [
        Quantities.Frequency, Quantities.Period, Quantities.DutyFactor, Quantities.HighLevel, Quantities.LowLevel, Quantities.Amplitude, Quantities.PeakToPeak,
        Quantities.Mean, Quantities.Rms, Quantities.RiseTime, Quantities.FallTime, Quantities.RiseOvershoot, Quantities.FallOvershoot, Quantities.RisePreshoot,
        Quantities.RingingFrequency, Quantities.RingingDampingRatio, Quantities.FundamentalLevel, Quantities.Harmonic(2), Quantities.Harmonic(3), Quantities.Thd,
    ];

    /// <summary>The capture's text and samples.</summary>
    /// <param name="seed">Which one.</param>
    /// <param name="samples">How many.</param>
    /// <param name="time">How times are written, as .NET's formats say it.</param>
    /// <param name="value">How voltages are written.</param>
    public static (byte[] Bytes, double[] Samples) Text(int seed, int samples, string time = "0.000000000e+00", string value = "0.000e+00")
    {
        var random = new Random(seed);
        double error = random.NextDouble() * 1e-4, phase = random.NextDouble();
        var volts = new double[samples];
        var text = new StringBuilder(samples * 28);
        text.Append(CultureInfo.InvariantCulture, $"time,CH1\ns,V\n");
        for (int i = 0; i < samples; i++)
        {
            double cycle = i * Interval * Nominal * (1 + error) + phase;
            double noise = Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble()) * 0.03;
            double level = (cycle - Math.Floor(cycle) < 0.5 ? 3.3 : 0) + noise;
            volts[i] = Math.Clamp(Math.Round(level / Step), -20, 235) * Step;
            text.Append((i * Interval - 1e-5).ToString(time, CultureInfo.InvariantCulture)).Append(',').Append(volts[i].ToString(value, CultureInfo.InvariantCulture)).Append('\n');
        }
        return (Encoding.UTF8.GetBytes(text.ToString()), volts);
    }

    /// <summary>An entry with readings about the truth, without the cost of measuring.</summary>
    /// <param name="seed">Which one.</param>
    /// <param name="samples">Length of the capture.</param>
    /// <param name="subjects">How many different subjects there are.</param>
    public static NewEntry Entry(int seed, int samples, int subjects = 100)
    {
        var random = new Random(seed);
        (byte[] bytes, double[] volts) = Text(seed, samples);
        var waveform = new Waveform("CH1", "V", new TimeAxis(-1e-5, Interval, AxisSource.Column), volts);
        double ppm = 200 * random.NextDouble() - 100;
        var readings = new List<Reading> { Made(Quantities.FrequencyError, ppm, 5) };
        foreach (Quantity quantity in Measured)
            readings.Add(Made(quantity, 1 + random.NextDouble(), 0.01));
        var limit = new Limit(Quantities.FrequencyError, -50, 50);
        Verdict verdict = Judge.Reading(limit, readings[0]);
        var capture = new Capture(Name(seed), Convert.ToHexStringLower(SHA256.HashData(bytes)), [waveform], []);
        Outcome outcome = verdict.Outcome switch { VerdictOutcome.Pass => Outcome.Pass, VerdictOutcome.Fail => Outcome.Fail, _ => Outcome.Undecided };
        var measurement = new Measurement(capture, [new ChannelMeasurement(waveform, readings, [], [], [verdict])], [], outcome);
        return Entry(seed, bytes, measurement, subjects);
    }

    /// <summary>An entry of a measurement that was made elsewhere.</summary>
    public static NewEntry Entry(int seed, byte[] bytes, Measurement measurement, int subjects) => new()
    {
        File = Name(seed),
        Bytes = bytes,
        Measurement = measurement,
        Context = new MeasurementContext { Program = "archive trials", PlanText = "nominal = \"455 kHz\"\n" },
        CapturedAt = new DateTimeOffset(2020, 1, 1, 0, 0, 0, TimeSpan.Zero).AddMinutes(30.0 * (seed % 200_000)),
        CapturedAtIsGiven = true,
        By = "trials",
        Details = new EntryDetails
        {
            Subject = string.Create(CultureInfo.InvariantCulture, $"IF source, board {seed % subjects + 1}"),
            Serial = string.Create(CultureInfo.InvariantCulture, $"S{seed:D6}"),
            Tags = seed % 10 == 0 ? ["soldered", "series-a"] : ["breadboard"],
            Conditions = new SortedDictionary<string, Condition> { ["supply"] = new(4.5 + seed % 11 * 0.1, "V"), ["temperature"] = new(20 + seed % 7, "°C") },
        },
    };

    private static string Name(int seed) => string.Create(CultureInfo.InvariantCulture, $"board-{seed:D6}.csv");

    private static Reading Made(Quantity quantity, double value, double spread) =>
        new(quantity, value, quantity.Unit, new Budget([BudgetTerm.Normal("noise", spread), BudgetTerm.Rectangular("timebase", spread, ofChain: true)]), "made");
}
