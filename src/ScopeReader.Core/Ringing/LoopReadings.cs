using ScopeReader.Limits;
using ScopeReader.Readings;

namespace ScopeReader.Ringing;

/// <summary>What rings as an inductance with a capacitance: the readings, and what they mean on the bench.</summary>
/// <param name="Inductance">ringing-inductance.</param>
/// <param name="Capacitance">ringing-capacitance; null where it was stated and not measured.</param>
/// <param name="Damping">damping-resistance; null where the ringing is damped as far already.</param>
/// <param name="Farad">The capacitance, measured or stated.</param>
/// <param name="DampingRatio">Of the ringing as it is.</param>
internal sealed record LoopReadings(Reading Inductance, Reading? Capacitance, Reading? Damping, double Farad, double DampingRatio)
{
    /// <summary>The damping ratio that the resistor is for: 16 % of overshoot on a fast edge.</summary>
    public const double Target = 0.5;

    /// <summary>From the ringing and a stated capacitance of the node.</summary>
    /// <param name="ringing">The ringing.</param>
    /// <param name="capacitance">F.</param>
    /// <param name="tolerance">Its tolerance, ± of itself; null where nobody stated it.</param>
    public static LoopReadings Of(Ringing ringing, double capacitance, double? tolerance)
    {
        const string method = "stated-capacitance";
        double f = ringing.Frequency, l = ResonantLoop.Inductance(f, capacitance), z = ResonantLoop.Impedance(l, capacitance);
        string[] missing = tolerance is null ? [PlanKeys.NodeCapacitance, .. ringing.Missing] : [.. ringing.Missing];
        return new LoopReadings(
            new Reading(Quantities.RingingInductance, l, "H", new Budget([.. ringing.Terms(-2 * l / f), .. Capacitor(-l)], missing), method) { Note = $"with the {Engineering.Given(capacitance, "F", 4)} that the plan states" },
            null, DampingOf(ringing, z, [.. ringing.Terms(-z / f), .. Capacitor(-z)], missing, method), capacitance, ringing.DampingRatio);

        BudgetTerm[] Capacitor(double sensitivity) => tolerance is { } t ? [BudgetTerm.Rectangular(PlanKeys.NodeCapacitance, t, sensitivity)] : [];
    }

    /// <summary>From the ringing without and with a known capacitor across the node.</summary>
    /// <param name="without">The ringing without it.</param>
    /// <param name="with">The ringing with it, at a lower frequency.</param>
    /// <param name="added">The capacitor, F.</param>
    /// <param name="tolerance">Its tolerance, ± of itself; null where nobody stated it.</param>
    public static LoopReadings Of(Ringing without, Ringing with, double added, double? tolerance)
    {
        double f1 = without.Frequency, f2 = with.Frequency, rho = f1 / f2 * (f1 / f2);
        double c = ResonantLoop.Capacitance(f1, f2, added), l = ResonantLoop.Inductance(f1, c), z = ResonantLoop.Impedance(l, c);
        double k = 2 * rho / (rho - 1), scale = 1 / (4 * Math.PI * Math.PI * added);
        string[] missing = tolerance is null ? [PlanKeys.AddedCapacitance] : [];
        string[] alsoTime = [.. missing, .. without.Missing];
        string unstated = tolerance is null ? "; as indicated: the capacitor's tolerance is not stated (--added-tolerance)" : "";
        string note = $"from {Engineering.Format(f1, "Hz", 4)} without and {Engineering.Format(f2, "Hz", 4)} with {Engineering.Given(added, "F", 4)}, undamped{unstated}";
        // A timebase's error is shared: it cancels in the ratio, and what is left in an inductance is twice of it, in an impedance once.
        BudgetTerm[] ofL = [.. without.Own(2 * scale / (f1 * f1 * f1)), .. with.Own(-2 * scale / (f2 * f2 * f2)), .. Capacitor(-l), .. without.Chain(-2 * l / f1)];
        BudgetTerm[] ofC = [.. without.Own(-c * k / f1), .. with.Own(c * k / f2), .. Capacitor(c)];
        BudgetTerm[] ofZ = [.. without.Own((1 / (f2 * f2) + 1 / (f1 * f1)) / (2 * Math.PI * added)), .. with.Own(-2 * f1 / (f2 * f2 * f2) / (2 * Math.PI * added)), .. Capacitor(-z), .. without.Chain(-z / f1)];
        return new LoopReadings(
            new Reading(Quantities.RingingInductance, l, "H", new Budget(ofL, alsoTime), "added-capacitor") { Note = note },
            new Reading(Quantities.RingingCapacitance, c, "F", new Budget(ofC, missing), "added-capacitor") { Note = note + "; the probe's own is in it" },
            DampingOf(without, z, ofZ, alsoTime, "added-capacitor"), c, without.DampingRatio);

        BudgetTerm[] Capacitor(double value) => tolerance is { } t ? [BudgetTerm.Rectangular(PlanKeys.AddedCapacitance, t, value)] : [];
    }

    private static Reading? DampingOf(Ringing ringing, double impedance, BudgetTerm[] ofImpedance, string[] missing, string method)
    {
        double lacking = Target - ringing.DampingRatio;
        if (lacking <= 0)
            return null;
        return new Reading(Quantities.DampingResistance, 2 * lacking * impedance, "ohm",
            new Budget([.. ofImpedance.Select(t => t.Times(2 * lacking)), BudgetTerm.Normal("damping", ringing.DampingUncertainty, -2 * impedance)], missing), method)
        {
            Note = "added in series at the driver, for a damping ratio of 0.5: 16 % of overshoot on a fast edge",
        };
    }

    /// <summary>An edge's ringing, undamped.</summary>
    /// <param name="Frequency">Undamped frequency, Hz.</param>
    /// <param name="DampingRatio">Damping ratio.</param>
    /// <param name="DampingUncertainty">Standard uncertainty of it.</param>
    /// <param name="Budget">Uncertainty of the frequency.</param>
    public sealed record Ringing(double Frequency, double DampingRatio, double DampingUncertainty, Budget Budget)
    {
        /// <summary>Chain terms that nobody stated.</summary>
        public IReadOnlyList<string> Missing => Budget.Missing;

        /// <summary>The ringing of two readings; null where one is missing or the frequency is not in Hz.</summary>
        public static Ringing? Of(Reading? frequency, Reading? damping)
        {
            if (frequency is not { Unit: "Hz" } f || damping is not { } ratio)
                return null;
            double z = ratio.Value, root = Math.Sqrt((1 - z) * (1 + z));
            // f0 = f/√(1 − ζ²); the fit's covariance of the two is near 0 for light damping.
            Budget budget = f.Budget.Times(1 / root).With(BudgetTerm.Normal("damping", ratio.Budget.Repeatability, f.Value * z / (root * root * root)));
            return new Ringing(f.Value / root, z, ratio.Budget.Repeatability, budget);
        }

        /// <summary>Every term, for a reading that changes so much with the frequency.</summary>
        public IEnumerable<BudgetTerm> Terms(double sensitivity) => Budget.Terms.Select(t => t.Times(sensitivity));

        /// <summary>The capture's own terms.</summary>
        public IEnumerable<BudgetTerm> Own(double sensitivity) => Budget.Terms.Where(t => !t.OfChain).Select(t => t.Times(sensitivity));

        /// <summary>The chain's terms.</summary>
        public IEnumerable<BudgetTerm> Chain(double sensitivity) => Budget.Terms.Where(t => t.OfChain).Select(t => t.Times(sensitivity));
    }
}
