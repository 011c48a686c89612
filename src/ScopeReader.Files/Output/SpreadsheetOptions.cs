using System.Globalization;
using CsvHelper;

namespace ScopeReader.Files.Output;

/// <summary>How CSV is written: to be opened in a spreadsheet as it is.</summary>
/// <remarks>A text that a spreadsheet would take for a formula gets an apostrophe before it.</remarks>
internal static class SpreadsheetOptions
{
    public static CsvWriterOptions Create() => new()
    {
        NewLine = "\n",
        FormatProvider = CultureInfo.InvariantCulture,
        Injection = CsvInjection.Escape,
        // What starts a formula, also after characters that a spreadsheet drops from the start of a cell.
        InjectionCharacters = "=+-@\t\r\n",
        TrueValue = "true",
        FalseValue = "false",
    };
}
