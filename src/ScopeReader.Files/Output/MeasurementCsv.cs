using System.Globalization;
using CsvHelper;
using ScopeReader.Limits;
using ScopeReader.Readings;

namespace ScopeReader.Files.Output;

/// <summary>Readings as CSV, one row a reading.</summary>
/// <remarks>
/// Made to be opened in a spreadsheet as it is: a text that a spreadsheet would take for a formula gets an apostrophe
/// before it. Numbers are written to their last bit, with a decimal point.
/// </remarks>
public sealed class MeasurementCsv : IDisposable
{
    private static readonly CsvWriterOptions Options = new()
    {
        NewLine = "\n",
        FormatProvider = CultureInfo.InvariantCulture,
        Injection = CsvInjection.Escape,
        // What starts a formula, also after characters that a spreadsheet drops from the start of a cell.
        InjectionCharacters = "=+-@\t\r\n",
        TrueValue = "true",
        FalseValue = "false",
    };

    private readonly CsvWriter _writer;

    /// <summary>Starts with the header row.</summary>
    /// <param name="output">Where the rows go; stays open.</param>
    public MeasurementCsv(TextWriter output)
    {
        _writer = CsvWriter.Create(output, Options, leaveOpen: true);
        _writer.WriteHeader("file", "channel", "segment", "quantity", "value", "unit", "standardUncertainty", "expandedUncertainty", "coverage", "method", "primary", "outcome");
    }

    /// <summary>Writes one file's readings; a file that could not be read has none.</summary>
    public void Write(MeasuredFile file)
    {
        ArgumentNullException.ThrowIfNull(file);
        foreach (ChannelMeasurement channel in file.Measurement?.Channels ?? [])
            foreach (Reading reading in channel.Readings)
                Write(file.File, channel, reading);
        _writer.Flush();
    }

    /// <inheritdoc/>
    public void Dispose() => _writer.Dispose();

    private void Write(string file, ChannelMeasurement channel, Reading reading)
    {
        _writer.WriteField(file);
        _writer.WriteField(channel.Channel.Name);
        _writer.WriteField(channel.Channel.Segment, default);
        _writer.WriteField(reading.Quantity.Id);
        _writer.WriteField(reading.Value, "R");
        _writer.WriteField(reading.Unit);
        _writer.WriteField(reading.Budget.StandardUncertainty, "R");
        _writer.WriteField(reading.Budget.ExpandedUncertainty, "R");
        _writer.WriteField(Budget.Coverage, "R");
        _writer.WriteField(reading.Method);
        _writer.WriteField(reading.IsPrimary);
        _writer.WriteField(Outcome(channel, reading));
        _writer.EndRecord();
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
