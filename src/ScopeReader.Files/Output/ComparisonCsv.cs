using CsvHelper;
using ScopeReader.Comparing;

namespace ScopeReader.Files.Output;

/// <summary>Differences as CSV, one row a difference; numbers to their last bit, with a decimal point.</summary>
public static class ComparisonCsv
{
    private static readonly CsvWriterOptions Options = SpreadsheetOptions.Create();

    /// <summary>Writes header and rows.</summary>
    /// <param name="output">Where they go.</param>
    /// <param name="differences">The differences; none leaves the header.</param>
    public static void Write(TextWriter output, IEnumerable<Difference> differences)
    {
        ArgumentNullException.ThrowIfNull(differences);
        using var writer = CsvWriter.Create(output, Options, leaveOpen: true);
        writer.WriteHeader("quantity", "unit", "file", "channel", "reference", "value", "difference", "expandedUncertainty", "significant");
        foreach (Difference d in differences)
        {
            writer.WriteField(d.Quantity.Id);
            writer.WriteField(d.Unit);
            writer.WriteField(d.File);
            writer.WriteField(d.Channel);
            writer.WriteField(d.Reference, "R");
            writer.WriteField(d.Value, "R");
            writer.WriteField(d.Change, "R");
            writer.WriteField(d.Budget.ExpandedUncertainty, "R");
            writer.WriteField(d.IsSignificant switch { true => "true", false => "false", null => "" });
            writer.EndRecord();
        }
    }
}
