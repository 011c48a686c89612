using CsCheck;
using ScopeReader.Captures;
using ScopeReader.Files.Plans;

namespace ScopeReader.Tests.Plans;

public class ImportTableTests
{
    private static readonly Gen<string> s_name = Of([.. "aZ0 µ\"\\'#[],=\t\u0001"]).Array[1, 12].Select(c => new string(c));

    private static Gen<T> Of<T>(params T[] items) => Gen.Int[0, items.Length - 1].Select(i => items[i]);

    [Fact]
    public void Settings_written_out_read_the_same() =>
        Gen.Select(Of<char?>(null, ',', ';', '\t', '|', ' '), Of<char?>(null, '.', ','), Gen.Int[1, 1000].Nullable(), Gen.Double[1e-12, 1e3].Nullable(), s_name.List[1, 4].Null(), Gen.Int[1, 9].Nullable(), Gen.Double[-1e6, -1e-6].Nullable())
            .Sample((delimiter, mark, line, interval, columns, segment, factor) =>
            {
                var settings = new ImportSettings { Delimiter = delimiter, DecimalMark = mark, FirstLine = line, Interval = interval, Columns = columns, Segment = segment, Factor = factor, Units = ["ms", ""], Encoding = "utf-16" };
                ImportSettings read = ImportTable.Parse(ImportTable.TextOf(settings)!, "made").Settings;
                return read.Columns?.SequenceEqual(columns!) != false && read.Units!.SequenceEqual(settings.Units) && read with { Columns = columns, Units = settings.Units } == settings;
            }, iter: 200);

    [Fact]
    public void Settings_that_say_nothing_have_no_text() => Assert.Null(ImportTable.TextOf(ImportSettings.Automatic));
}
