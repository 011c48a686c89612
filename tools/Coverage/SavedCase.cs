using System.Globalization;
using ScopeReader.Captures;

namespace ScopeReader.Coverage;

/// <summary>The first seed's capture as a file, to be measured by the program itself.</summary>
internal static class SavedCase
{
    /// <summary>Writes every digit of a waveform, or of a spectrum trace.</summary>
    public static void Write(MadeCase made, string path)
    {
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
}
