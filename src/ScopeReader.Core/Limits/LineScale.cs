using ScopeReader.Harmonics;
using ScopeReader.Readings;

namespace ScopeReader.Limits;

/// <summary>From a trace's scale to a limit line's: what is added to each level, and the uncertainty of that.</summary>
/// <param name="Offset">Level on the line's scale less level on the trace's, dB.</param>
/// <param name="Budget">The budget of a level on the line's scale, from its own terms.</param>
internal sealed record LineScale(double Offset, Func<IEnumerable<BudgetTerm>, Budget> Budget)
{
    /// <summary>The scale, or null where the line's unit cannot be reached.</summary>
    public static LineScale? Of(LimitLine line, TraceLevels levels, Plan plan)
    {
        var chain = new ChainErrors(plan, null);
        if (line.Unit == "dBc")
            return levels.Strongest() is { } carrier
                ? new LineScale(-carrier.LevelDb, own => chain.ForRelativeDecibels([.. own, .. carrier.LevelTerms.Select(t => BudgetTerm.Normal(t.Name + " of carrier", t.Value, t.Sensitivity))]))
                : null;
        double? offset = (levels.Unit, line.Unit, plan.Chain.Impedance) switch
        {
            ("dBm", "dBm", _) or ("dBV", "dBV", _) => 0,
            ("dBV", "dBµV", _) => -Decibels.DbvOfDbuv(0),
            ("dBV", "dBm", { } ohms) => Decibels.DbmOfDbv(0, ohms),
            ("dBm", "dBµV", { } ohms) => Decibels.DbuvOfDbm(0, ohms),
            ("dBm", "dBV", { } ohms) => -Decibels.DbmOfDbv(0, ohms),
            _ => null,
        };
        return offset is { } dB ? new LineScale(dB, chain.ForAbsoluteDecibels) : null;
    }
}
