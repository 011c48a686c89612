using System.Globalization;
using ScopeReader.Captures;

namespace ScopeReader.Files.Plans;

public static partial class PlanKeyList
{
    private static IEnumerable<PlanKey> ChainKeys()
    {
        yield return InChain("instrument", "\"bench instrument, input 2\"", "the instrument, in your words", (c, v) => c with { Instrument = v.Text() });
        yield return InChain("calibration-due", "2027-06-30", "the day its calibration runs out", (c, v) => c with { CalibrationDue = v.Date() });
        yield return InChain("timebase-tolerance", "\"25 ppm\"", "the data sheet's ± bound of the timebase; unknown", (c, v) => c with { TimebaseTolerancePpm = v.Amount("ppm", 0) });
        yield return InChain("timebase-reads", "\"1.2 ppm\"", "indicated minus true frequency: an instrument that reads high is positive; not corrected", (c, v) => c with { TimebaseReadsPpm = v.Amount("ppm") });
        yield return InChain("timebase-uncertainty", "\"0.2 ppm\"", "standard uncertainty of timebase-reads", (c, v) => c with { TimebaseUncertaintyPpm = v.Amount("ppm", 0) });
        yield return InChain("timebase-calibrated", "2026-03-31", "the day timebase-reads was found", (c, v) => c with { TimebaseCalibrated = v.Date() });
        yield return InChain("timebase-ageing", "\"1 ppm/year\"", "± bound of the change since then; none", (c, v) => c with { TimebaseAgeingPpmPerYear = v.Amount("ppm/year", 0) });
        yield return InChain("gain-tolerance", "\"2 %\"", "± bound of the gain, of the value; unknown", (c, v) => c with { GainTolerancePercent = v.Amount("%", 0) });
        yield return InChain("offset-tolerance", "\"10 mV\"", "± bound of the offset; unknown", (c, v) => c with { OffsetTolerance = v.Amount("V", 0) });
        yield return InChain("flatness", "\"0.5 dB\"", "± bound of the level between two frequencies; unknown", (c, v) => c with { FlatnessDb = v.Amount("dB", 0) });
        yield return InChain("bits", "8", "bits of the converter; found from the data", (c, v) => c with { Bits = v.WholeNumber(1, 32) });
        yield return InChain("scale", "10", "multiplies the file's values; 1", (c, v) => c with { Scale = NotZero(v) });
        yield return InChain("probe-factor", "\"10x\"", "division of the probe: for loading and causes, it multiplies nothing", (c, v) => c with { ProbeFactor = Times(v) });
        yield return InChain("probe-capacitance", "\"12 pF\"", "input capacitance of the probe", (c, v) => c with { ProbeCapacitance = v.Positive("F") });
        yield return InChain("probe-bandwidth", "\"150 MHz\"", "-3 dB bandwidth of the probe", (c, v) => c with { ProbeBandwidth = v.Positive("Hz") });
        yield return InChain("ground-lead", "\"150 mm\"", "length of the probe's ground lead", (c, v) => c with { GroundLead = v.Amount("m", 0) });
        yield return InChain("input-bandwidth", "\"100 MHz\"", "-3 dB bandwidth of the instrument's input", (c, v) => c with { InputBandwidth = v.Positive("Hz") });
        yield return InChain("bandwidth-basis", "\"catalogue\"", "what the bandwidths are: catalogue or measured; catalogue",
            (c, v) => c with { BandwidthBasis = v.Choice(("catalogue", BandwidthBasis.Catalogue), ("measured", BandwidthBasis.Measured)) });
        yield return InChain("response", "\"gaussian\"", "shape of the response: gaussian, flat or unknown; unknown",
            (c, v) => c with { Response = v.Choice(("gaussian", ChainResponse.Gaussian), ("flat", ChainResponse.Flat), ("unknown", ChainResponse.Unknown)) });
        yield return InChain("distortion-floor", "\"-60 dBc\"", "level below which lines may be the instrument's own; none", (c, v) => c with { DistortionFloorDbc = v.Amount("dBc") });
        yield return InChain("impedance", "\"50 ohm\"", "what powers refer to; without it there is no dBm", (c, v) => c with { Impedance = v.Positive("ohm") });
    }

    private static double NotZero(PlanValue value)
    {
        double factor = value.Amount("1");
        return factor != 0 ? factor : throw value.Wrong("expected a factor that is not zero, found 0");
    }

    // "10x", "x10", "10:1" and 10 are all said at a bench.
    private static double Times(PlanValue value)
    {
        string text = value.Found.Trim('"', '\'', ' ');
        string number = text.EndsWith(":1", StringComparison.Ordinal) ? text[..^2] : text.Trim('x', 'X', '×', ' ');
        return double.TryParse(number, NumberStyles.Float, CultureInfo.InvariantCulture, out double factor) && factor > 0 && double.IsFinite(factor)
            ? factor
            : throw value.Wrong($"expected a division, such as \"10x\", found {value.Found}");
    }
}
