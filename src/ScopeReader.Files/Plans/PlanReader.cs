using System.Text;
using ScopeReader.Captures;
using ScopeReader.Levels;
using ScopeReader.Limits;

namespace ScopeReader.Files.Plans;

/// <summary>Reads a plan.</summary>
public static class PlanReader
{
    // A plan is a page; a capture given as a plan by mistake is not worth parsing.
    private const long LongestFile = 1 << 20;

    /// <summary>Reads a plan's file.</summary>
    /// <param name="path">The file, TOML in UTF-8.</param>
    /// <exception cref="PlanException">The file is missing, cannot be read, is no TOML, or says something that no plan can say.</exception>
    public static Plan ReadFile(string path)
    {
        ArgumentNullException.ThrowIfNull(path);
        try
        {
            var file = new FileInfo(path);
            if (file.Exists && file.Length > LongestFile)
                throw new PlanException(path, null, "too long for a plan; is it a capture?");
            return Parse(File.ReadAllText(path, new UTF8Encoding(false, throwOnInvalidBytes: true)), path);
        }
        catch (DecoderFallbackException)
        {
            throw new PlanException(path, null, "expected UTF-8 text, found other bytes; save the plan as UTF-8");
        }
        catch (Exception e) when (e is FileNotFoundException or DirectoryNotFoundException)
        {
            throw new PlanException(path, null, "there is no such plan");
        }
        catch (Exception e) when (e is UnauthorizedAccessException or IOException)
        {
            throw new PlanException(path, null, Directory.Exists(path) ? "expected a plan, found a folder" : $"the plan could not be read: {e.Message}");
        }
    }

    /// <summary>Reads a plan's text.</summary>
    /// <param name="text">TOML.</param>
    /// <param name="file">Its name in messages.</param>
    /// <exception cref="PlanException">The text is no TOML, or says something that no plan can say.</exception>
    public static Plan Parse(string text, string file)
    {
        ArgumentNullException.ThrowIfNull(text);
        ArgumentNullException.ThrowIfNull(file);
        PlanDocument document = PlanDocument.Parse(text, file);
        Plan plan = Plan.Empty;
        foreach (PlanSection section in document.Sections)
        {
            CheckTable(section, file);
            if (section.Name is not (PlanKeyList.Limit or PlanKeyList.LimitLine))
                foreach ((string key, PlanValue value) in section.Entries)
                    plan = section.Name == PlanKeyList.Conditions ? AddCondition(plan, key, value) : Apply(plan, section.Name, key, value);
        }
        CheckTimebase(plan.Chain, document);
        CheckLevels(plan.Levels, document);
        // Limits come last: they are held against the other tables, wherever those stand.
        Limit[] limits = [.. document.Sections.Where(s => s.Name == PlanKeyList.Limit).Select(s => LimitReader.Read(s, plan, file))];
        LimitLine[] lines = [.. document.Sections.Where(s => s.Name == PlanKeyList.LimitLine).Select(s => LimitLineReader.Read(s, file))];
        return plan with { Limits = limits, LimitLines = lines };
    }

    private static Plan Apply(Plan plan, string table, string key, PlanValue value)
    {
        PlanKey known = PlanKeyList.Find(table, key) ?? throw value.Unknown("key", key, PlanKeyList.NamesIn(table));
        return known.Apply!(plan, value);
    }

    private static Plan AddCondition(Plan plan, string name, PlanValue value)
    {
        (double amount, string unit) = value.AnyAmount();
        return plan with { Conditions = new Dictionary<string, Condition>(plan.Conditions) { [name] = new Condition(amount, unit) } };
    }

    private static void CheckTable(PlanSection section, string file)
    {
        if (section.Name == PlanDocument.Top)
            return;
        if (!PlanKeyList.Tables.Contains(section.Name))
            throw new PlanException(file, section.Line, $"unknown table \"{section.Name}\"; {NearestWord.Hint(section.Name, PlanKeyList.Tables)}");
        if (section.IsList != (section.Name is PlanKeyList.Limit or PlanKeyList.LimitLine))
            throw new PlanException(file, section.Line, section.IsList ? $"expected [{section.Name}], found [[{section.Name}]]" : $"expected [[{section.Name}]], with two brackets, found [{section.Name}]");
    }

    private static void CheckLevels(LevelSettings levels, PlanDocument document)
    {
        if (levels is { Low: { } low, High: { } high } && low >= high)
            throw document.Sections.Where(s => s.Name == PlanKeyList.Levels).SelectMany(s => s.Entries).First(e => e.Key == "low").Value
                .Wrong("the low state level is not below the high one");
    }

    // Half a calibration would be taken for none, and the correction or its ageing lost without a word.
    private static void CheckTimebase(MeasuringChain chain, PlanDocument document)
    {
        Require(chain.TimebaseReadsPpm is null || chain.TimebaseUncertaintyPpm is not null, "timebase-reads", "timebase-uncertainty", "its standard uncertainty");
        Require(chain.TimebaseUncertaintyPpm is null || chain.TimebaseReadsPpm is not null, "timebase-uncertainty", "timebase-reads", "the error that was found");
        Require(chain.TimebaseAgeingPpmPerYear is null || chain.TimebaseCalibrated is not null, "timebase-ageing", "timebase-calibrated", "the day it counts from");

        void Require(bool complete, string key, string needed, string what)
        {
            if (!complete)
                throw document.Sections.Where(s => s.Name == PlanKeyList.Chain).SelectMany(s => s.Entries).First(e => e.Key == key).Value
                    .Wrong($"needs {needed} beside it, {what}");
        }
    }
}
