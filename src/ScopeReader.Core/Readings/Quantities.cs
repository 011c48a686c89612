using System.Globalization;
using static ScopeReader.Readings.CaptureKinds;

namespace ScopeReader.Readings;

/// <summary>The one table of quantities: help, plans, JSON and the analysers all read it.</summary>
public static class Quantities
{
    private const string Ieee181 = "IEEE Std 181-2011 (terms; clauses not quoted)", Common = "common practice";
    private const string Ratio = "ratio of amplitudes, 20 log10(A_k/A_1)";

    /// <summary>The highest harmonic that has an identifier.</summary>
    public const int HighestHarmonic = 100;

    private static readonly Quantity[] HarmonicTable = [.. Enumerable.Range(2, HighestHarmonic - 1).Select(k => new Quantity(
        string.Create(CultureInfo.InvariantCulture, $"harmonic-{k}"), "dBc",
        string.Create(CultureInfo.InvariantCulture, $"level of harmonic {k} relative to the fundamental"), Ratio, Waveform | Spectrum))];

    /// <summary>Frequency of the wave.</summary>
    public static Quantity Frequency { get; } = new("frequency", "Hz", "repetition frequency of the wave", Common, Waveform);

    /// <summary>Deviation from nominal.</summary>
    public static Quantity FrequencyError { get; } = new("frequency-error", "ppm", "frequency over the plan's nominal frequency, less 1, in millionths", Common, Waveform | Spectrum);

    /// <summary>Period of the wave.</summary>
    public static Quantity Period { get; } = new("period", "s", "time from one transition to the next of the same direction, mean over the record", Ieee181, Waveform);

    private const string Jittery = "terms differ between authors; the definition is printed with the value";

    /// <summary>Period jitter.</summary>
    public static Quantity PeriodJitter { get; } = new("period-jitter", "s", "standard deviation of the periods between edges of one direction, the digitiser's own part taken off", Jittery, Waveform);

    /// <summary>Cycle-to-cycle jitter.</summary>
    public static Quantity CycleToCycleJitter { get; } = new("cycle-to-cycle-jitter", "s", "rms difference of neighbouring periods, the digitiser's own part taken off", Jittery, Waveform);

    /// <summary>Time-interval error.</summary>
    public static Quantity TimeIntervalError { get; } = new("time-interval-error", "s", "largest less smallest distance of n edges of one direction from a steady period", Jittery, Waveform);

    /// <summary>Drift of the frequency.</summary>
    public static Quantity FrequencyDrift { get; } = new("frequency-drift", "ppm/s", "change of frequency with time over the record, of the frequency", "parabola through the phases of the record's parts", Waveform);

    /// <summary>Allan deviation.</summary>
    public static Quantity AllanDeviation { get; } = new("allan-deviation", "1", "Allan deviation of the frequency at the stated averaging time, overlapping", "NIST SP 1065 (2008)", Waveform);

    /// <summary>Duty factor.</summary>
    public static Quantity DutyFactor { get; } = new("duty-factor", "%", "time above the 50 % reference level over the period", Ieee181, Waveform);

    /// <summary>High state level.</summary>
    public static Quantity HighLevel { get; } = new("high-level", "V", "level of the high state, away from the transitions", Ieee181, Waveform);

    /// <summary>Low state level.</summary>
    public static Quantity LowLevel { get; } = new("low-level", "V", "level of the low state, away from the transitions", Ieee181, Waveform);

    /// <summary>High minus low.</summary>
    public static Quantity Amplitude { get; } = new("amplitude", "V", "high state level minus low state level", Ieee181, Waveform);

    /// <summary>Largest minus smallest.</summary>
    public static Quantity PeakToPeak { get; } = new("peak-to-peak", "V", "largest value minus smallest value of the wave", Common, Waveform);

    /// <summary>Mean over whole periods.</summary>
    public static Quantity Mean { get; } = new("mean", "V", "mean over whole periods", Common, Waveform);

    /// <summary>Root mean square over whole periods.</summary>
    public static Quantity Rms { get; } = new("rms", "V", "root mean square over whole periods, the mean in it", Common, Waveform);

    /// <summary>Rise time.</summary>
    public static Quantity RiseTime { get; } = new("rise-time", "s", "transition duration of rising edges between the reference levels, as seen through the chain", Ieee181, Waveform);

    /// <summary>Fall time.</summary>
    public static Quantity FallTime { get; } = new("fall-time", "s", "transition duration of falling edges between the reference levels, as seen through the chain", Ieee181, Waveform);

    /// <summary>Rise time without the chain's.</summary>
    public static Quantity RiseTimeCorrected { get; } = new("rise-time-corrected", "s", "rise time with the duration of the chain's stated response taken out, as a difference of squares", "Elmore 1948", Waveform);

    /// <summary>Fall time without the chain's.</summary>
    public static Quantity FallTimeCorrected { get; } = new("fall-time-corrected", "s", "fall time with the duration of the chain's stated response taken out, as a difference of squares", "Elmore 1948", Waveform);

    /// <summary>Slew rate of rising edges.</summary>
    public static Quantity RiseSlew { get; } = new("rise-slew", "V/s", "level change between the reference levels over the rise time", Common, Waveform);

    /// <summary>Slew rate of falling edges.</summary>
    public static Quantity FallSlew { get; } = new("fall-slew", "V/s", "level change between the reference levels over the fall time, negative", Common, Waveform);

    /// <summary>Overshoot after rising edges.</summary>
    public static Quantity RiseOvershoot { get; } = new("rise-overshoot", "%", "highest excursion above the high level after a rising edge, of amplitude", Ieee181, Waveform);

    /// <summary>Overshoot after falling edges.</summary>
    public static Quantity FallOvershoot { get; } = new("fall-overshoot", "%", "lowest excursion below the low level after a falling edge, of amplitude", Ieee181, Waveform);

    /// <summary>Undershoot after rising edges.</summary>
    public static Quantity RiseUndershoot { get; } = new("rise-undershoot", "%", "lowest excursion below the high level after a rising edge has reached it, of amplitude", Ieee181, Waveform);

    /// <summary>Undershoot after falling edges.</summary>
    public static Quantity FallUndershoot { get; } = new("fall-undershoot", "%", "highest excursion above the low level after a falling edge has reached it, of amplitude", Ieee181, Waveform);

    /// <summary>Preshoot before rising edges.</summary>
    public static Quantity RisePreshoot { get; } = new("rise-preshoot", "%", "excursion below the low level before a rising edge, of amplitude", Ieee181, Waveform);

    /// <summary>Preshoot before falling edges.</summary>
    public static Quantity FallPreshoot { get; } = new("fall-preshoot", "%", "excursion above the high level before a falling edge, of amplitude", Ieee181, Waveform);

    /// <summary>Settling after rising edges.</summary>
    public static Quantity RiseSettling { get; } = new("rise-settling", "s", "from the 50 % instant of a rising edge to the last entry into the settling band about the high level", Ieee181, Waveform);

    /// <summary>Settling after falling edges.</summary>
    public static Quantity FallSettling { get; } = new("fall-settling", "s", "from the 50 % instant of a falling edge to the last entry into the settling band about the low level", Ieee181, Waveform);

    /// <summary>Width of the high state.</summary>
    public static Quantity HighWidth { get; } = new("high-width", "s", "time from a rising to the next falling 50 % instant", Ieee181, Waveform);

    /// <summary>Width of the low state.</summary>
    public static Quantity LowWidth { get; } = new("low-width", "s", "time from a falling to the next rising 50 % instant", Ieee181, Waveform);

    private const string SecondOrder = "damped sinusoid A e^(-t/T) cos(2 pi f t + p), fitted after the edge";

    /// <summary>Frequency of the ringing.</summary>
    public static Quantity RingingFrequency { get; } = new("ringing-frequency", "Hz", "frequency of the damped oscillation after an edge", SecondOrder, Waveform);

    /// <summary>Damping ratio of the ringing.</summary>
    public static Quantity RingingDampingRatio { get; } = new("ringing-damping-ratio", "1", "decay rate over undamped angular frequency of the oscillation after an edge", SecondOrder, Waveform);

    /// <summary>Quality factor of the ringing.</summary>
    public static Quantity RingingQ { get; } = new("ringing-q", "1", "1 over twice the damping ratio", SecondOrder, Waveform);

    /// <summary>Decay time of the ringing.</summary>
    public static Quantity RingingDecayTime { get; } = new("ringing-decay-time", "s", "time in which the oscillation after an edge falls to 1/e", SecondOrder, Waveform);

    /// <summary>Amplitude of the ringing.</summary>
    public static Quantity RingingAmplitude { get; } = new("ringing-amplitude", "%", "envelope of the oscillation, carried back to the 50 % instant, of amplitude", SecondOrder, Waveform);

    private const string Loop = "undamped frequency 1/(2 pi sqrt(LC))";

    /// <summary>Inductance that rings.</summary>
    public static Quantity RingingInductance { get; } = new("ringing-inductance", "H", "inductance of the loop that rings, from a stated capacitance or an added capacitor", Loop, Waveform);

    /// <summary>Capacitance that rings.</summary>
    public static Quantity RingingCapacitance { get; } = new("ringing-capacitance", "F", "capacitance of the node that rings, from the frequencies without and with an added capacitor", Loop, Waveform);

    /// <summary>Resistance that damps the ringing.</summary>
    public static Quantity DampingResistance { get; } = new("damping-resistance", "ohm", "resistance to add in series for a damping ratio of 0.5", "2 z sqrt(L/C)", Waveform);

    /// <summary>Frequency of an oscillation of its own.</summary>
    public static Quantity OscillationFrequency { get; } = new("oscillation-frequency", "Hz", "frequency of an oscillation that no edge starts, on the levels of a two-state wave", Common, Waveform);

    /// <summary>Level of an oscillation of its own.</summary>
    public static Quantity OscillationLevel { get; } = new("oscillation-level", "V", "rms of an oscillation that no edge starts, on the levels where it is", Common, Waveform);

    /// <summary>Level of the fundamental.</summary>
    public static Quantity FundamentalLevel { get; } = new("fundamental-level", "dBV", "rms level of the fundamental, relative to 1 V", Common, Waveform);

    /// <summary>Power of the fundamental.</summary>
    public static Quantity FundamentalPower { get; } = new("fundamental-power", "dBm", "power of the fundamental in the plan's impedance, relative to 1 mW", Common, Waveform);

    /// <summary>The strongest harmonic.</summary>
    public static Quantity WorstHarmonic { get; } = new("worst-harmonic", "dBc", "level of the strongest harmonic that was looked for, relative to the fundamental", Ratio, Waveform | Spectrum);

    /// <summary>Total harmonic distortion to the fundamental.</summary>
    public static Quantity Thd { get; } = new("thd", "%", "root sum of squares of the harmonics over the fundamental", "THD_F", Waveform);

    /// <summary>Total harmonic distortion to the whole.</summary>
    public static Quantity ThdR { get; } = new("thd-r", "%", "root sum of squares of the harmonics over that of harmonics and fundamental", "THD_R", Waveform);

    /// <summary>Signal to noise and distortion.</summary>
    public static Quantity Sinad { get; } = new("sinad", "dB", "power of the fundamental over that of everything else but the mean", "IEEE Std 1057 and 1241 (from memory)", Waveform);

    /// <summary>Effective number of bits.</summary>
    public static Quantity Enob { get; } = new("enob", "bit", "bits of the ideal converter that would leave as much beside a full-scale sine", "(SINAD - 1.76 dB)/6.02 dB, IEEE Std 1057 and 1241 (from memory)", Waveform);

    /// <summary>Spurious-free dynamic range.</summary>
    public static Quantity Sfdr { get; } = new("sfdr", "dB", "level of the fundamental over the strongest other line, harmonic or not", "IEEE Std 1241 (from memory)", Waveform);

    /// <summary>Noise density.</summary>
    public static Quantity NoiseFloor { get; } = new("noise-floor", "dBc/Hz", "noise power in 1 Hz relative to the fundamental, mean over the band, lines left out", Common, Waveform);

    /// <summary>Frequency of the strongest line.</summary>
    public static Quantity PeakFrequency { get; } = new("peak-frequency", "Hz", "frequency of the strongest line of a spectrum trace", "parabola through three levels in dB", Spectrum);

    /// <summary>Power of the strongest line.</summary>
    public static Quantity PeakPower { get; } = new("peak-power", "dBm", "power of the strongest line of a spectrum trace", "parabola through three levels in dB", Spectrum);

    /// <summary>Level of the strongest line.</summary>
    public static Quantity PeakLevel { get; } = new("peak-level", "dBV", "level of the strongest line of a spectrum trace in volts", "parabola through three levels in dB", Spectrum);

    private const string FirstCrossings = "first crossings on both sides, as seen beside the resolution filter";

    /// <summary>Width of the strongest line 3 dB down.</summary>
    public static Quantity Bandwidth3Db { get; } = new("bandwidth-3db", "Hz", "width of the strongest line where it has half of its power", FirstCrossings, Spectrum);

    /// <summary>Width of the strongest line 6 dB down.</summary>
    public static Quantity Bandwidth6Db { get; } = new("bandwidth-6db", "Hz", "width of the strongest line where it has a quarter of its power", FirstCrossings, Spectrum);

    /// <summary>Width of the strongest line 60 dB down.</summary>
    public static Quantity Bandwidth60Db { get; } = new("bandwidth-60db", "Hz", "width of the strongest line 60 dB below its top", FirstCrossings, Spectrum);

    /// <summary>Band of 99 % of the power.</summary>
    public static Quantity OccupiedBandwidth { get; } = new("occupied-bandwidth", "Hz", "band that holds 99 % of the power of the trace, half a percent outside on each side", "Radio Regulations, occupied bandwidth", Spectrum);

    /// <summary>Power of the whole trace.</summary>
    public static Quantity ChannelPower { get; } = new("channel-power", "dBm", "power in the trace's whole span, from its points and the resolution filter's noise bandwidth", Common, Spectrum);

    /// <summary>Noise in 1 Hz.</summary>
    public static Quantity NoiseDensity { get; } = new("noise-density", "dBm/Hz", "power of the trace's noise in 1 Hz, lines left out", Common, Spectrum);

    /// <summary>Margin to a limit line.</summary>
    public static Quantity LimitLineMargin { get; } = new("limit-line-margin", "dB", "least distance of a spectrum trace from a limit line of the plan, positive inside it", Common, Spectrum);

    /// <summary>Every quantity that this program measures.</summary>
    public static IReadOnlyList<Quantity> All { get; } =
    [
        Frequency, FrequencyError, Period, PeriodJitter, CycleToCycleJitter, TimeIntervalError, FrequencyDrift, AllanDeviation, DutyFactor,
        HighLevel, LowLevel, Amplitude, PeakToPeak, Mean, Rms,
        RiseTime, FallTime, RiseTimeCorrected, FallTimeCorrected, RiseSlew, FallSlew, RiseOvershoot, FallOvershoot, RiseUndershoot, FallUndershoot,
        RisePreshoot, FallPreshoot, RiseSettling, FallSettling, HighWidth, LowWidth,
        RingingFrequency, RingingDampingRatio, RingingQ, RingingDecayTime, RingingAmplitude, RingingInductance, RingingCapacitance, DampingResistance,
        OscillationFrequency, OscillationLevel,
        FundamentalLevel, FundamentalPower, .. HarmonicTable, WorstHarmonic, Thd, ThdR, Sinad, Enob, Sfdr, NoiseFloor,
        PeakFrequency, PeakPower, PeakLevel, Bandwidth3Db, Bandwidth6Db, Bandwidth60Db, OccupiedBandwidth, ChannelPower, NoiseDensity, LimitLineMargin,
    ];

    private static readonly Dictionary<string, Quantity> ById = All.ToDictionary(q => q.Id, StringComparer.Ordinal);

    /// <summary>The quantity of a harmonic.</summary>
    /// <param name="number">2 to <see cref="HighestHarmonic"/>.</param>
    public static Quantity Harmonic(int number)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(number, 2);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(number, HighestHarmonic);
        return HarmonicTable[number - 2];
    }

    /// <summary>The quantity with an identifier, or null.</summary>
    public static Quantity? Find(string id) => ById.GetValueOrDefault(id);
}
