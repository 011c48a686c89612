using System.Globalization;
using System.Text;
using ScopeReader.Signals;

namespace ScopeReader.DemoCaptures;

/// <summary>Files that a reader may stumble over.</summary>
internal static class Awkward
{
    /// <summary>
    /// Semicolons, decimal commas, a settings list above, two channels of different units, a row of units, and times cut to
    /// three digits, so that many rows share one.
    /// </summary>
    public static byte[] LoggerExport()
    {
        const decimal start = -0.9e-3m, interval = 0.4e-6m;
        const int count = 4_500;
        Recording recording = new()
        {
            Start = (double)start,
            Interval = (double)interval,
            Count = count,
            Noise = 0.002,
            Converter = new Converter(12, -1, 5),
            Seed = 91,
        };
        var gate = new SquareWave { Frequency = 20.06e3, Low = 0.02, High = 3.31, DutyFactor = 0.35, RiseTime = 2.4e-6, FallTime = 2.1e-6 };
        var sense = new HarmonicSine { Frequency = 20.06e3, Amplitude = 0.4, Offset = 0.75, Harmonics = [new(2, -14, 60), new(3, -19.5, 170)] };
        double[] volts = recording.Samples(gate.Signal), millivolts = (recording with { Seed = 92 }).Samples(sense.Build());

        var text = new StringBuilder("Logger of bench 3\r\nSaved;14 March, 16:02\r\nRows;4500\r\nGain gate;1,000\r\nGain sense;0,050\r\nRemark;fan driver, second try\r\n\r\n");
        text.Append("t;gate;sense\r\ns;V;mV\r\n");
        for (int i = 0; i < count; i++)
        {
            string time = (start + i * interval).ToString("0.00E+00", CultureInfo.InvariantCulture);
            text.Append(Comma(time)).Append(';').Append(Comma(Table.Fixed(volts[i], 3))).Append(';')
                .Append(Comma(Table.Fixed(1000 * millivolts[i], 1))).Append("\r\n");
        }
        return Encoding.UTF8.GetBytes(text.ToString());
    }

    /// <summary>Values alone: nothing in the file says how far apart they are.</summary>
    public static byte[] NoInterval()
    {
        var sine = new HarmonicSine { Frequency = 455e3 * (1 + 22e-6), Amplitude = 1.2, Offset = 0.03, Harmonics = [new(2, -40), new(3, -46, 90)] };
        Recording recording = Bench.EightBit(0, 20e-9m, 8_000, -2.56, 0.02, 93) with { Delay = 0.4e-6 };
        var text = new StringBuilder("Probe B (V)\n");
        foreach (double v in recording.Samples(sine.Build()))
            text.Append(Table.Fixed(v, 2)).Append('\n');
        return Encoding.UTF8.GetBytes(text.ToString());
    }

    private static string Comma(string number) => number.Replace('.', ',');
}
