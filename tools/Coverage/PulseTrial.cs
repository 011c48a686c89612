using System.Numerics;
using ScopeReader.Captures;
using ScopeReader.Harmonics;
using ScopeReader.Readings;
using ScopeReader.Signals;

namespace ScopeReader.Coverage;

/// <summary>Pulses of known series at 60 dB signal to noise: how far the harmonics are off.</summary>
internal static class PulseTrial
{
    private const int Orders = 40, Runs = 20;

    public static void Write(ulong first, TextWriter output)
    {
        One("square", 0.5, 0, first, output);
        One("25 % pulse", 0.25, 0, first, output);
        One("trapezoid, edges of a tenth of the period", 0.5, 0.1, first, output);
    }

    private static void One(string name, double duty, double edge, ulong first, TextWriter output)
    {
        double worst = 0;
        for (ulong seed = first; seed < first + Runs; seed++)
        {
            var draw = new NormalNoise(seed);
            var coefficients = new Complex[Orders + 1];
            for (int k = 1; k <= Orders; k++)
            {
                double sinc = edge == 0 ? 1 : Math.Sin(Math.PI * k * edge) / (Math.PI * k * edge);
                coefficients[k] = Complex.FromPolarCoordinates(Math.Sin(Math.PI * k * duty) / (Math.PI * k) * sinc, -Math.PI * k * duty);
            }
            var signal = new PeriodicSignal(455e3 * draw.Uniform(0.99, 1.01), new FourierSeries(coefficients), 1 / (2 * Math.PI * Orders));
            double amplitude = 2 * coefficients[1].Magnitude;
            Waveform taken = new Recording { Interval = 2e-8, Count = 100_000, Noise = amplitude / Math.Sqrt(2) * 1e-3, Seed = seed, Delay = draw.Uniform() * 1e-6 }.Take(signal);
            foreach (Reading reading in Analysis.Measure(new Capture("made", "", [taken], []), new Plan { Chain = DbcSource.Exact }).Channels[0].Readings)
                if (reading.Quantity.Id.StartsWith("harmonic-", StringComparison.Ordinal))
                {
                    int k = int.Parse(reading.Quantity.Id.AsSpan("harmonic-".Length), System.Globalization.CultureInfo.InvariantCulture);
                    worst = Math.Max(worst, Math.Abs(reading.Value - IdealPulse.LevelDbc(duty, k) - (edge == 0 ? 0 : IdealPulse.TrapezoidLevelDbc(duty, edge, k) - IdealPulse.LevelDbc(duty, k))));
                }
        }
        DbcTable.Line(output, $"{name}, 60 dB signal to noise: {Runs} records, harmonics to 10 off by at most {worst:F4} dB");
    }
}
