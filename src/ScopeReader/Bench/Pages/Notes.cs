using ScopeReader.Bench.Drawing;
using ScopeReader.Bench.Work;

namespace ScopeReader.Bench.Pages;

/// <summary>What the panels beside the readings say.</summary>
internal static class Notes
{
    /// <summary>Cautions first, then what was found, then what the reader doubted.</summary>
    public static IReadOnlyList<Note> Findings(OpenCapture? capture) => capture?.Measurement is not { } measurement ? [] :
    [
        .. measurement.Cautions.Select(text => new Note("caution", text, Ink.Undecided)),
        .. capture.ChannelMeasured!.Findings.Select(f => new Note(f.Code, f.Text, Ink.Accent)),
        .. measurement.Capture.Doubts.Select(text => new Note("doubt", text, Ink.Undecided)),
    ];

    /// <summary>What could not be measured on the channel, quantities of one reason together.</summary>
    public static IReadOnlyList<Note> NotMeasured(OpenCapture? capture) => capture?.ChannelMeasured is not { } channel ? [] :
        [.. channel.NotMeasured.GroupBy(n => n.Reason).Select(g => new Note(g.First().Quantity.Id,
            g.Count() == 1 ? g.Key : $"{g.Key} (also {string.Join(", ", g.Skip(1).Select(n => n.Quantity.Id))})", Ink.Accent))];
}
