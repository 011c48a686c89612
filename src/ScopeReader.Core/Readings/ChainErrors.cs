using ScopeReader.Captures;

namespace ScopeReader.Readings;

/// <summary>What the measuring chain adds to readings of one channel: corrections, budget terms, and the terms nobody stated.</summary>
/// <remarks>An analyser gives its own terms; each method here adds those of the chain that the reading depends on.</remarks>
public sealed class ChainErrors
{
    private const double Ppm = 1e-6, DaysPerYear = 365.25;
    private const string Timebase = "timebase", Gain = "gain", Offset = "offset", Flatness = "flatness";

    private readonly MeasuringChain _chain;
    private readonly TimeAxis? _axis;
    private readonly DateOnly? _asOf;

    /// <param name="plan">The plan, whose chain is stated or not.</param>
    /// <param name="axis">The waveform's axis; null for a spectrum trace.</param>
    public ChainErrors(Plan plan, TimeAxis? axis)
    {
        ArgumentNullException.ThrowIfNull(plan);
        (_chain, _axis, _asOf) = (plan.Chain, axis, plan.AsOf);
        // A calibration names the error it found: an instrument that reads high shows frequencies high and times short.
        FrequencyFactor = 1 / (1 + (plan.Chain.TimebaseReadsPpm ?? 0) * Ppm);
    }

    /// <summary>True frequency over indicated frequency, from the timebase's calibration.</summary>
    public double FrequencyFactor { get; }

    /// <summary>True time over indicated time.</summary>
    public double TimeFactor => 1 / FrequencyFactor;

    /// <summary>Budget of a time or a frequency: the timebase and the rounding of the file's times.</summary>
    /// <param name="value">The corrected reading, s or Hz (or per sample).</param>
    /// <param name="own">The capture's own terms, in the unit of the value.</param>
    public Budget ForTime(double value, params IEnumerable<BudgetTerm> own)
    {
        var terms = new List<BudgetTerm>(own);
        bool known = AddTimebase(terms, value);
        return new Budget(terms, known ? [] : [Timebase]);
    }

    /// <summary>Budget of a level: gain and offset.</summary>
    /// <param name="value">The reading, in the channel's unit.</param>
    /// <param name="own">The capture's own terms, in the unit of the value.</param>
    public Budget ForLevel(double value, params IEnumerable<BudgetTerm> own)
    {
        var terms = new List<BudgetTerm>(own);
        var missing = new List<string>();
        AddGain(terms, missing, value);
        if (_chain.OffsetTolerance is { } bound)
            terms.Add(BudgetTerm.Rectangular(Offset, bound, ofChain: true));
        else
            missing.Add(Offset);
        return new Budget(terms, missing);
    }

    /// <summary>Budget of a difference of levels: gain alone.</summary>
    /// <param name="value">The reading, in the channel's unit.</param>
    /// <param name="own">The capture's own terms, in the unit of the value.</param>
    public Budget ForLevelDifference(double value, params IEnumerable<BudgetTerm> own)
    {
        var terms = new List<BudgetTerm>(own);
        var missing = new List<string>();
        AddGain(terms, missing, value);
        return new Budget(terms, missing);
    }

    /// <summary>Budget of a level over a time: gain and timebase.</summary>
    /// <param name="value">The reading, in the channel's unit per second.</param>
    /// <param name="own">The capture's own terms, in the unit of the value.</param>
    public Budget ForSlew(double value, params IEnumerable<BudgetTerm> own)
    {
        var terms = new List<BudgetTerm>(own);
        var missing = new List<string>();
        AddGain(terms, missing, value);
        if (!AddTimebase(terms, value))
            missing.Add(Timebase);
        return new Budget(terms, missing);
    }

    /// <summary>Budget of a level relative to another at another frequency, in dB: the flatness.</summary>
    /// <param name="own">The capture's own terms, dB.</param>
    public Budget ForRelativeDecibels(params IEnumerable<BudgetTerm> own) => ForDecibels(own, absolute: false);

    /// <summary>Budget of a level in dB relative to a unit: gain and flatness.</summary>
    /// <param name="own">The capture's own terms, dB.</param>
    public Budget ForAbsoluteDecibels(params IEnumerable<BudgetTerm> own) => ForDecibels(own, absolute: true);

    private Budget ForDecibels(IEnumerable<BudgetTerm> own, bool absolute)
    {
        var terms = new List<BudgetTerm>(own);
        var missing = new List<string>();
        if (absolute)
            AddGain(terms, missing, 20 / Math.Log(10));
        if (_chain.FlatnessDb is { } bound)
            terms.Add(BudgetTerm.Rectangular(Flatness, bound, ofChain: true));
        else
            missing.Add(Flatness);
        return new Budget(terms, missing);
    }

    // The input is the relative gain error; to first order the reading changes by its own value times that.
    private void AddGain(List<BudgetTerm> terms, List<string> missing, double sensitivity)
    {
        if (_chain.GainTolerancePercent is { } percent)
            terms.Add(BudgetTerm.Rectangular(Gain, percent / 100, sensitivity, ofChain: true));
        else
            missing.Add(Gain);
    }

    // False where the timebase is unknown. Relative errors of time and frequency are equal to first order.
    private bool AddTimebase(List<BudgetTerm> terms, double value)
    {
        if (_axis is { IsTimed: false })
            return true; // Per sample: there is no timebase in the reading.
        if (_axis is { RelativeRounding: > 0 } rounded)
            terms.Add(BudgetTerm.Rectangular("interval", rounded.RelativeRounding, value));

        if (_chain is { TimebaseReadsPpm: not null, TimebaseUncertaintyPpm: { } ppm })
        {
            terms.Add(BudgetTerm.Normal(Timebase, ppm * Ppm, value, ofChain: true));
            if (_chain is { TimebaseAgeingPpmPerYear: { } ageing, TimebaseCalibrated: { } calibrated } && _asOf is { } day && day > calibrated)
                terms.Add(BudgetTerm.Rectangular("timebase-ageing", ageing * Ppm * (day.DayNumber - calibrated.DayNumber) / DaysPerYear, value, ofChain: true));
            return true;
        }
        if (_chain.TimebaseTolerancePpm is { } bound)
        {
            terms.Add(BudgetTerm.Rectangular(Timebase, bound * Ppm, value, ofChain: true));
            return true;
        }
        return false;
    }
}
