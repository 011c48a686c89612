using ScopeReader.Captures;
using ScopeReader.Levels;
using ScopeReader.Readings;

namespace ScopeReader.Files.Plans;

/// <summary>The one list of a plan's keys: the reader, its messages and the help all use it.</summary>
public static partial class PlanKeyList
{
    internal const string Chain = "chain", Levels = "levels", Import = "import", Conditions = "conditions", Limit = "limit", LimitLine = "limit-line";

    /// <summary>Every key outside [conditions], whose names are the person's own.</summary>
    public static IReadOnlyList<PlanKey> All { get; } = [.. TopKeys(), .. ChainKeys(), .. LevelKeys(), .. ImportKeys(), .. LimitKeys(), .. LimitLineKeys()];

    /// <summary>Every table, as its name stands between the brackets.</summary>
    public static IReadOnlyList<string> Tables { get; } = [Chain, Levels, Import, Conditions, Limit, LimitLine];

    internal static IEnumerable<string> NamesIn(string table) => All.Where(k => k.Table == table).Select(k => k.Name);

    internal static PlanKey? Find(string table, string name) => All.FirstOrDefault(k => k.Table == table && k.Name == name);

    private static IEnumerable<PlanKey> TopKeys()
    {
        yield return Top("subject", "\"IF source, board 7\"", "what is measured", (p, v) => p with { Subject = v.Text() });
        yield return Top("serial", "\"0042\"", "its serial number", (p, v) => p with { Serial = v.Text() });
        yield return Top("operator", "\"N. N.\"", "who measures", (p, v) => p with { Operator = v.Text() });
        yield return Top("notes", "\"after the crystal was changed\"", "anything worth keeping", (p, v) => p with { Notes = v.Text() });
        yield return Top("nominal", "\"455 kHz\"", "the frequency it should have; none", (p, v) => p with { Nominal = v.Positive("Hz") });
        yield return Top("channel", "\"CH1\"", "judge only this channel; all", (p, v) => p with { Channel = v.Text() });
    }

    private static IEnumerable<PlanKey> LevelKeys()
    {
        yield return Level("reference", "[10, 90]", "reference levels of edges, % of amplitude; [10, 90]", References);
        yield return Level("high", "\"3.3 V\"", "the high state level, where it shall not be found; found", (l, v) => l with { High = v.Amount("V") });
        yield return Level("low", "\"0 V\"", "the low state level; found", (l, v) => l with { Low = v.Amount("V") });
        yield return Level("estimator", "\"shorth\"", "how state levels are found; shorth, the only one", (l, v) => v.Choice(("shorth", l)));
        yield return Level("settling-band", "\"2 %\"", "half-width of the settling band, % of amplitude; 2 %", (l, v) => l with { SettlingBandPercent = Within(v, v.Percent(), 0, 50, "%") });
        yield return Level("overshoot-region", "3", "where overshoot counts after an edge, in transition durations; 3", (l, v) => l with { OvershootRegion = v.Positive("1") });
        yield return Level("harmonics", "10", "the highest harmonic looked for; 10", (l, v) => l with { Harmonics = v.WholeNumber(2, Quantities.HighestHarmonic) });
    }

    private static IEnumerable<PlanKey> LimitKeys()
    {
        yield return new PlanKey(Limit, "quantity", "\"frequency-error\"", "the quantity it judges");
        yield return new PlanKey(Limit, "low", "\"-50 ppm\"", "lower bound; none");
        yield return new PlanKey(Limit, "high", "\"50 ppm\"", "upper bound; none");
        yield return new PlanKey(Limit, "rule", "\"guarded\"", "guarded (inside the limit by the uncertainty) or simple (on the value alone); guarded");
        yield return new PlanKey(Limit, "guard", "1", "guard band over expanded uncertainty; 1");
        yield return new PlanKey(Limit, "channel", "\"CH1\"", "judges this channel only; every channel of the kind");
    }

    private static IEnumerable<PlanKey> LimitLineKeys()
    {
        yield return new PlanKey(LimitLine, "name", "\"harmonics\"", "what you call the line");
        yield return new PlanKey(LimitLine, "unit", "\"dBm\"", "unit of the levels: dBm, dBc, dBµV or dBV");
        yield return new PlanKey(LimitLine, "points", "[[\"1 MHz\", -40], [\"30 MHz\", -60]]", "frequency and level of each point, frequencies rising; two at one frequency make a step");
        yield return new PlanKey(LimitLine, "side", "\"upper\"", "upper (levels stay below the line) or lower; upper");
        yield return new PlanKey(LimitLine, "interpolation", "\"linear\"", "linear or log in frequency between the points; linear");
        yield return new PlanKey(LimitLine, "rule", "\"guarded\"", "guarded (inside the line by the uncertainty) or simple (on the value alone); guarded");
        yield return new PlanKey(LimitLine, "guard", "1", "guard band over expanded uncertainty; 1");
    }

    private static LevelSettings References(LevelSettings levels, PlanValue value)
    {
        double[] both = [.. value.Items().Select(item => item.Percent())];
        return both is [var low, var high] && low > 0 && high < 100 && low < high
            ? levels with { ReferenceLowPercent = low, ReferenceHighPercent = high }
            : throw value.Wrong($"expected two percentages, the lower first, such as [10, 90], found {value.Found}");
    }

    internal static double Within(PlanValue value, double number, double above, double below, string unit) => number > above && number < below
        ? number
        : throw value.Wrong($"expected more than {Engineering.Format(above, unit, 2)} and less than {Engineering.Format(below, unit, 2)}, found {value.Found}");

    private static PlanKey Top(string name, string example, string meaning, Func<Plan, PlanValue, Plan> apply) =>
        new(PlanDocument.Top, name, example, meaning) { Apply = apply };

    private static PlanKey Level(string name, string example, string meaning, Func<LevelSettings, PlanValue, LevelSettings> apply) =>
        new(Levels, name, example, meaning) { Apply = (plan, value) => plan with { Levels = apply(plan.Levels, value) } };

    private static PlanKey InChain(string name, string example, string meaning, Func<MeasuringChain, PlanValue, MeasuringChain> apply) =>
        new(Chain, name, example, meaning) { Apply = (plan, value) => plan with { Chain = apply(plan.Chain, value) } };

    private static PlanKey InImport(string name, string example, string meaning, Func<ImportSettings, PlanValue, ImportSettings> apply) =>
        new(Import, name, example, meaning) { Apply = (plan, value) => plan with { Import = apply(plan.Import, value) } };
}
