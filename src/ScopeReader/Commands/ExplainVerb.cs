using System.CommandLine;
using ScopeReader.Commands.Tables;
using ScopeReader.Files.Plans;
using ScopeReader.Readings;

namespace ScopeReader.Commands;

/// <summary><c>explain QUANTITY</c>: what a quantity is.</summary>
internal static class ExplainVerb
{
    public static Command Create(Surroundings surroundings)
    {
        var name = new Argument<string?>("QUANTITY") { Description = "such as rise-time; plan for every key of a plan, or one of these; without it, every quantity", Arity = ArgumentArity.ZeroOrOne };
        var command = new Command("explain", "say what a quantity is, its unit and where its definition stands");
        command.Arguments.Add(name);
        command.SetAction(parsed =>
        {
            var sheet = new Sheet(surroundings.Width(), colour: false);
            string? word = parsed.GetValue(name);
            if (word is null)
                All(sheet);
            else if (Quantities.Find(word) is { } quantity)
                One(sheet, quantity);
            else if (PlanKeyList.All.Where(k => word == "plan" || k.Name == word).ToArray() is { Length: > 0 } keys)
                Keys(sheet, keys);
            else
                throw new UsageException($"unknown quantity \"{word}\"; {NearestWord.Hint(word, [.. Quantities.All.Select(q => q.Id)])}");
            surroundings.Output.Write(sheet.ToString());
            return ExitStatus.Passed;
        });
        return command;
    }

    private static void One(Sheet sheet, Quantity quantity)
    {
        sheet.Heading($"{quantity.Id}, in {Unit(quantity)}");
        sheet.Columns(
        [
            ["meaning", quantity.Meaning],
            ["source", quantity.Source],
            ["found in", quantity.Kinds switch { CaptureKinds.Waveform => "waveforms", CaptureKinds.Spectrum => "spectrum traces", _ => "waveforms and spectrum traces" }],
        ]);
    }

    private static void All(Sheet sheet)
    {
        int last = Quantities.HighestHarmonic;
        foreach (Quantity quantity in Quantities.All)
            switch (Phrases.HarmonicNumber(quantity))
            {
                case 0:
                    sheet.Line(quantity.Id);
                    sheet.Indented($"{quantity.Meaning}; in {Unit(quantity)}");
                    break;
                case 2:
                    sheet.Line($"harmonic-2 to {Quantities.Harmonic(last)}");
                    sheet.Indented("level of that harmonic relative to the fundamental; in dBc");
                    break;
                default:
                    break;
            }
    }

    private static void Keys(Sheet sheet, PlanKey[] keys)
    {
        foreach (IGrouping<string, PlanKey> table in keys.GroupBy(k => k.Table))
        {
            sheet.Heading(table.Key switch { "" => "plan, at the top", "limit" or "limit-line" => $"plan, [[{table.Key}]], one for each", var name => $"plan, [{name}]" });
            foreach (PlanKey key in table)
            {
                sheet.Line($"{key.Name} = {key.Example}");
                sheet.Indented(key.Meaning);
            }
        }
    }

    private static string Unit(Quantity quantity) => quantity.Unit switch
    {
        "V" => "V (or the channel's own unit)",
        "1" => "a number without a unit",
        var unit => unit,
    };
}
