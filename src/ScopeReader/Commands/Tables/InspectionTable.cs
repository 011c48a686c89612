using System.Globalization;
using ScopeReader.Captures;
using ScopeReader.Files;
using ScopeReader.Readings;

namespace ScopeReader.Commands.Tables;

/// <summary>How a file was understood, for people.</summary>
internal static class InspectionTable
{
    public static string Of(ImportReport report, int width, bool colour)
    {
        var sheet = new Sheet(width, colour);
        sheet.Heading(SafeText.Of(report.File));
        sheet.Columns(
        [
            ["text", SafeText.Of(report.Encoding)],
            ["columns", $"between them: {SafeText.Of(report.Delimiter)}; decimal mark {SafeText.Of(report.DecimalMark)}"],
            ["lines", string.Create(CultureInfo.InvariantCulture, $"{report.PreambleLines} of preamble, {report.HeaderRows} of header, numbers from line {report.FirstLine}")],
            ["axis", Axis(report.Axis)],
            .. report.Remembered.Count > 0 ? (string[][])[["folder", SafeText.Of($"{FolderMemory.FileName} says: {string.Join("; ", report.Remembered)}")]] : [],
        ]);
        sheet.Heading("Channels");
        foreach (ChannelReport channel in report.Channels)
        {
            sheet.Line($"{SafeText.Of(channel.Name)}{(channel.Segment > 1 ? string.Create(CultureInfo.InvariantCulture, $", segment {channel.Segment}") : "")}: {channel.Kind}");
            sheet.Indented(Values(channel));
        }
        if (report.Doubts.Count > 0)
        {
            sheet.Heading("Doubts");
            foreach (string doubt in report.Doubts)
                sheet.Columns([["-", SafeText.Of(doubt)]]);
        }
        return sheet.ToString();
    }

    private static string Axis(AxisReport axis)
    {
        if (axis.Source == AxisSource.None || axis.Interval is not { } interval)
            return axis.Source == AxisSource.None ? "none: state it with --interval or --rate" : $"uneven, from the {OutputWords.Of(axis.Source)}";
        string text = $"{Phrases.Number(interval, axis.Unit, 9)} from point to point, from the {OutputWords.Of(axis.Source)}";
        if (axis is { IntervalLow: { } low, IntervalHigh: { } high } && high > low)
            text += string.Create(CultureInfo.InvariantCulture, $"; rounding leaves ± {Engineering.Format((high - low) / 2 / interval * 1e6, "ppm", 2)}");
        return axis.WorstDeviation is { } worst and > 0 ? $"{text}; the worst point lies {Engineering.Format(worst, axis.Unit, 2)} off" : text;
    }

    private static string Values(ChannelReport channel)
    {
        string text = string.Create(CultureInfo.InvariantCulture,
            $"{channel.Samples} samples from {Engineering.Format(channel.Minimum, channel.Unit)} to {Engineering.Format(channel.Maximum, channel.Unit)}");
        if (channel.Unit.Length == 0)
            text += ", unit unknown";
        if (channel.Clipped > 0)
            text += string.Create(CultureInfo.InvariantCulture, $", {channel.Clipped} at the edge of the range");
        return channel.Missing > 0 ? text + string.Create(CultureInfo.InvariantCulture, $", {channel.Missing} missing and left out") : text;
    }
}
