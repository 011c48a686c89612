using CsvHelper;
using ScopeReader.Limits;
using ScopeReader.Readings;

namespace ScopeReader.Files.Output;

/// <summary>Readings as CSV, one row a reading.</summary>
/// <remarks>
/// Made to be opened in a spreadsheet as it is: a text that a spreadsheet would take for a formula gets an apostrophe
/// before it. Numbers are written to their last bit, with a decimal point.
/// </remarks>
public static class MeasurementCsv
{
    private static readonly CsvWriterOptions Options = SpreadsheetOptions.Create();

    /// <summary>Writes the header row.</summary>
    /// <param name="output">Where the row goes.</param>
    public static void WriteHeader(TextWriter output)
    {
        using var writer = CsvWriter.Create(output, Options, leaveOpen: true);
        writer.WriteHeader("file", "channel", "segment", "quantity", "value", "unit", "standardUncertainty", "expandedUncertainty", "coverage", "method", "primary", "outcome");
    }

    /// <summary>Writes one file's readings; a file that could not be read has none.</summary>
    /// <param name="output">Where the rows go.</param>
    /// <param name="file">The file.</param>
    public static void Write(TextWriter output, MeasuredFile file)
    {
        ArgumentNullException.ThrowIfNull(file);
        using var writer = CsvWriter.Create(output, Options, leaveOpen: true);
        foreach (ChannelMeasurement channel in file.Measurement?.Channels ?? [])
            foreach (Reading reading in channel.Readings)
                Write(writer, file.File, channel, reading);
    }

    private static void Write(CsvWriter writer, string file, ChannelMeasurement channel, Reading reading)
    {
        writer.WriteField(file);
        writer.WriteField(channel.Channel.Name);
        writer.WriteField(channel.Channel.Segment, default);
        writer.WriteField(reading.Quantity.Id);
        writer.WriteField(reading.Value, "R");
        writer.WriteField(reading.Unit);
        writer.WriteField(reading.Budget.StandardUncertainty, "R");
        writer.WriteField(reading.Budget.ExpandedUncertainty, "R");
        writer.WriteField(Budget.Coverage, "R");
        writer.WriteField(reading.Method);
        writer.WriteField(reading.IsPrimary);
        writer.WriteField(Outcome(channel, reading));
        writer.EndRecord();
    }

    // Several limits may judge one reading: the answer that needs attention first.
    private static string Outcome(ChannelMeasurement channel, Reading reading)
    {
        VerdictOutcome[] outcomes = [.. channel.Verdicts.Where(v => ReferenceEquals(v.Reading, reading)).Select(v => v.Outcome)];
        foreach (VerdictOutcome worst in (ReadOnlySpan<VerdictOutcome>)[VerdictOutcome.NotMeasured, VerdictOutcome.Fail, VerdictOutcome.Undecided, VerdictOutcome.Pass])
            if (outcomes.Contains(worst))
                return OutputWords.Of(worst);
        return "";
    }
}
