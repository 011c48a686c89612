using ScopeReader.Captures;
using ScopeReader.Files.Text;
using ScopeReader.Readings;

namespace ScopeReader.Files.Plans;

public static partial class PlanKeyList
{
    private static readonly (string Word, char Mark)[] Delimiters = [("comma", ','), ("semicolon", ';'), ("tab", '\t'), ("space", ' '), ("bar", '|')];

    private static IEnumerable<PlanKey> ImportKeys()
    {
        yield return InImport("delimiter", "\"semicolon\"", "between columns: comma, semicolon, tab, space, bar or the character itself; found", (i, v) => i with { Delimiter = Delimiter(v) });
        yield return InImport("decimal", "\"comma\"", "the decimal mark: point or comma; found",
            (i, v) => i with { DecimalMark = v.Text() is "." or "," ? v.Text()[0] : v.Choice(("point", '.'), ("comma", ',')) });
        yield return InImport("first-line", "12", "number of the first line of data, from 1; found", (i, v) => i with { FirstLine = v.WholeNumber(1, int.MaxValue) });
        yield return InImport("encoding", "\"utf-8\"", "the text's encoding; found", (i, v) => i with { Encoding = Encoding(v) });
        yield return InImport("interval", "\"2 ns\"", "sample interval, where the file states none", (i, v) => OnlyOne(i, v) with { Interval = v.Positive("s") });
        yield return InImport("rate", "\"500 MHz\"", "samples a second, in place of interval", (i, v) => OnlyOne(i, v) with { Interval = 1 / v.Positive("Hz") });
        yield return InImport("columns", "[\"time\", \"CH1\", \"skip\"]", "what each column is: time, frequency, skip or a channel's name; found", (i, v) => i with { Columns = [.. v.Items().Select(item => item.Text())] });
        yield return InImport("factor", "0.004", "multiplies the values, where the file left that out; 1", (i, v) => i with { Factor = Factor(v) });
        yield return InImport("segment", "2", "read this segment alone, from 1; all", (i, v) => i with { Segment = v.WholeNumber(1, int.MaxValue) });
        yield return InImport("units", "[\"ms\", \"mV\", \"\"]", "unit of each column; found", (i, v) => i with { Units = [.. v.Items().Select(UnitOfColumn)] });
    }

    private static char Delimiter(PlanValue value)
    {
        string text = value.Text();
        foreach ((string word, char mark) in Delimiters)
            if (text == word || text == mark.ToString())
                return mark;
        throw value.Wrong($"expected {string.Join(", ", Delimiters.Select(d => d.Word))} or the character itself, found {value.Found}; the nearest is {NearestWord.Of(text, Delimiters.Select(d => d.Word))}");
    }

    private static string Encoding(PlanValue value) => TextEncoding.Named(value.Text()) is not null ? value.Text()
        : throw value.Wrong($"expected {string.Join(", ", TextEncoding.Names)}, found {value.Found}; the nearest is {NearestWord.Of(value.Text(), TextEncoding.Names)}");

    private static double Factor(PlanValue value)
    {
        double factor = value.Amount("1");
        return factor != 0 && double.IsNormal(factor) ? factor : throw value.Wrong($"expected a number that is not zero, found {value.Found}");
    }

    private static ImportSettings OnlyOne(ImportSettings import, PlanValue value) =>
        import.Interval is null ? import : throw value.Wrong("interval and rate say the same thing; keep one of them");

    private static string UnitOfColumn(PlanValue value)
    {
        string text = value.Text();
        return text.Length == 0 || Units.TryUnit(text, out _, out _) ? text : throw value.Unknown("unit", text, PlanUnits.All);
    }
}
