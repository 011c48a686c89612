using ScopeReader.Limits;
using ScopeReader.Readings;

namespace ScopeReader.Files.Plans;

/// <summary>Reads one [[limit]] of a plan.</summary>
internal static class LimitReader
{
    private static readonly string[] Bounds = ["low", "high"];

    public static Limit Read(PlanSection section, Plan plan, string file)
    {
        var values = new Dictionary<string, PlanValue>(StringComparer.Ordinal);
        foreach ((string key, PlanValue value) in section.Entries)
            if (!values.TryAdd(PlanKeyList.Find(PlanKeyList.Limit, key)?.Name ?? throw value.Unknown("key", key, PlanKeyList.NamesIn(PlanKeyList.Limit)), value))
                throw value.Wrong("stated twice");

        if (!values.TryGetValue("quantity", out PlanValue? named))
            throw new PlanException(file, section.Line, "this limit names no quantity; add quantity = \"frequency-error\", or another");
        Quantity quantity = Quantities.Find(named.Text()) ?? throw named.Unknown("quantity", named.Text(), Quantities.All.Select(q => q.Id));
        CheckHarmonic(quantity, named, plan);

        bool relative = IsRelative(quantity, values);
        string unit = relative ? "ppm" : quantity.Unit;
        double? low = values.GetValueOrDefault("low")?.Amount(unit), high = values.GetValueOrDefault("high")?.Amount(unit);
        if (low is null && high is null)
            throw new PlanException(file, section.Line, $"this limit on {quantity} has no bound; add low or high");
        if (low > high)
            throw values["low"].Wrong($"the lower bound, {values["low"].Found}, is above the upper, {values["high"].Found}");
        return new Limit(quantity, low, high)
        {
            Rule = values.GetValueOrDefault("rule")?.Choice(("guarded", DecisionRule.Guarded), ("simple", DecisionRule.Simple)) ?? DecisionRule.Guarded,
            Guard = values.GetValueOrDefault("guard")?.Amount("1", 0) ?? 1,
            Channel = values.GetValueOrDefault("channel")?.Text(),
            IsRelative = relative,
        };
    }

    // "-50 ppm" of a frequency or a period is meant from nominal; both bounds are then.
    private static bool IsRelative(Quantity quantity, Dictionary<string, PlanValue> values)
    {
        if (quantity != Quantities.Frequency && quantity != Quantities.Period)
            return false;
        PlanValue[] bounds = [.. Bounds.Select(values.GetValueOrDefault).OfType<PlanValue>()];
        bool[] relative = [.. bounds.Select(b => PlanUnits.UnitOf(b.Text()) is "ppm" or "%" or "ppb")];
        if (relative.Distinct().Count() > 1)
            throw bounds[1].Wrong($"one bound is relative to nominal and the other is not; write both in ppm, or both in {quantity.Unit}");
        return relative.Length > 0 && relative[0];
    }

    // A harmonic that nobody looks for would leave its limit unanswered for ever.
    private static void CheckHarmonic(Quantity quantity, PlanValue named, Plan plan)
    {
        const string Prefix = "harmonic-";
        if (quantity.Id.StartsWith(Prefix, StringComparison.Ordinal) && int.Parse(quantity.Id[Prefix.Length..], System.Globalization.CultureInfo.InvariantCulture) is int number && number > plan.Levels.Harmonics)
            throw named.Wrong(string.Create(System.Globalization.CultureInfo.InvariantCulture,
                $"{quantity} is beyond the harmonics that are looked for, 2 to {plan.Levels.Harmonics}; add harmonics = {number} to [levels]"));
    }
}
