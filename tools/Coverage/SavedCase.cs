using System.Globalization;
using ScopeReader.Captures;

namespace ScopeReader.Coverage;

/// <summary>The first seed's capture and plan as files, to be measured by the program itself.</summary>
internal static class SavedCase
{
    /// <summary>Writes every digit of a waveform, or of a spectrum trace, and its plan beside it.</summary>
    public static void Write(MadeCase made, string path)
    {
        WritePlan(made.Plan, Path.ChangeExtension(path, ".toml"));
        using var file = new StreamWriter(path) { NewLine = "\n" };
        Channel channel = made.Channel;
        file.WriteLine($"{(channel is Waveform ? "Time (s)" : "Frequency (Hz)")},{channel.Name} ({channel.Unit})");
        for (int i = 0; i < channel.Count; i++)
        {
            (double x, double y) = channel switch
            {
                Waveform w => (w.Axis.Start + i * w.Interval, w.Samples[i]),
                SpectrumTrace t => (t.Frequencies[i], t.Levels[i]),
                _ => throw new ArgumentException("a waveform or a spectrum trace", nameof(made)),
            };
            file.WriteLine(string.Create(CultureInfo.InvariantCulture, $"{x:R},{y:R}"));
        }
    }

    private static void WritePlan(Plan plan, string path)
    {
        MeasuringChain chain = plan.Chain;
        (string Key, double? Value, string Unit)[] keys =
        [
            ("timebase-tolerance", chain.TimebaseTolerancePpm, "ppm"), ("timebase-reads", chain.TimebaseReadsPpm, "ppm"),
            ("timebase-uncertainty", chain.TimebaseUncertaintyPpm, "ppm"), ("gain-tolerance", chain.GainTolerancePercent, "%"),
            ("offset-tolerance", chain.OffsetTolerance, "V"), ("flatness", chain.FlatnessDb, "dB"), ("impedance", chain.Impedance, "ohm"),
        ];
        using var file = new StreamWriter(path) { NewLine = "\n" };
        if (plan.Nominal is { } nominal)
            file.WriteLine(string.Create(CultureInfo.InvariantCulture, $"nominal = \"{nominal:R} Hz\""));
        file.WriteLine("[chain]");
        foreach ((string key, double? value, string unit) in keys)
            if (value is { } stated)
                file.WriteLine(string.Create(CultureInfo.InvariantCulture, $"{key} = \"{stated:R} {unit}\""));
    }
}
