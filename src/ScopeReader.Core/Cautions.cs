using ScopeReader.Captures;

namespace ScopeReader;

/// <summary>Safety notices that a measurement gives reason for. Each defers to local codes and licensed practice.</summary>
public static class Cautions
{
    /// <summary>Peak voltage from which a circuit is treated as dangerous to touch, V.</summary>
    /// <remarks>Common practice puts the limit near 42 V peak or 60 V DC in dry places and lower elsewhere; this stays under both.</remarks>
    public const double TouchVoltage = 30;

    /// <summary>Mains, hot chassis and stored charge.</summary>
    public const string Mains = "Voltages here can hurt: metal that looks like ground may be live, and capacitors keep their charge after switch-off. " +
        "Local codes and licensed practice come first; work on mains circuits is for people trained and authorised for it.";

    /// <summary>The probe's ground clip and rating.</summary>
    public const string Probe = "A probe's ground clip is usually joined to protective earth: clip it only to a point that is at earth potential, and never " +
        "defeat the instrument's earth. Check the probe's voltage rating against peaks and ringing; it falls with frequency.";

    /// <summary>What a spectrum analyser's input survives.</summary>
    public const string SpectrumInput = "Before connecting a spectrum analyser, know the largest RF power and DC voltage that its input survives; the label on it decides. " +
        "Start with attenuation and a DC block.";

    /// <summary>Radiating, and what a verdict is not.</summary>
    public const string Radiating = "A source may radiate: transmitting needs what local law demands, so keep tests shielded or into a load. " +
        "A verdict here is no certificate of compliance.";

    /// <summary>Changing the circuit.</summary>
    public const string Modifying = "Change parts only with the power off and capacitors discharged; a calculated part must be rated for its pulse voltage and power.";

    /// <summary>The notices for a measurement, most serious first.</summary>
    /// <param name="capture">What was read.</param>
    /// <param name="plan">The plan: a stated probe is one that is in use.</param>
    /// <param name="channels">What was measured and found.</param>
    public static IReadOnlyList<string> For(Capture capture, Plan plan, IReadOnlyList<ChannelMeasurement> channels)
    {
        ArgumentNullException.ThrowIfNull(capture);
        ArgumentNullException.ThrowIfNull(plan);
        ArgumentNullException.ThrowIfNull(channels);
        var cautions = new List<string>();
        if (capture.Channels.OfType<Waveform>().Any(IsDangerous))
            cautions.Add(Mains);
        if (plan.Chain is { ProbeFactor: not null } or { ProbeCapacitance: not null } or { GroundLead: not null } or { ProbeBandwidth: not null })
            cautions.Add(Probe);
        if (capture.Channels.Any(c => c is SpectrumTrace))
        {
            cautions.Add(SpectrumInput);
            cautions.Add(Radiating);
        }
        if (channels.Any(c => c.Findings.Any(f => f.Code.StartsWith("ringing", StringComparison.Ordinal))))
            cautions.Add(Modifying);
        return cautions;
    }

    private static bool IsDangerous(Waveform waveform)
    {
        if (waveform.Unit != "V")
            return false;
        foreach (double v in waveform.Samples)
            if (Math.Abs(v) > TouchVoltage)
                return true;
        return false;
    }
}
