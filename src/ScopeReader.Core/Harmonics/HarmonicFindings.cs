using System.Globalization;
using ScopeReader.Readings;
using static ScopeReader.Harmonics.HarmonicAnalyser;

namespace ScopeReader.Harmonics;

/// <summary>What the harmonics say: the wave's own shape, the instrument's distortion, the chain's roll-off.</summary>
internal sealed class HarmonicFindings(WaveformJob job, RollOff rollOff, IReadOnlyList<Reading> harmonics)
{
    // Edges take something off an ideal pulse's harmonics, and a wave may have a little more; beyond that it is no pulse.
    private const double PulseBelow = 6, PulseAbove = 1.5, EvenNear = 3;

    public void Write()
    {
        WriteShape();
        WriteOwn();
        WriteRollOff();
    }

    private void WriteShape()
    {
        if (job.Sheet.Primary(Quantities.DutyFactor) is not { } reading)
            return;
        double duty = reading.Value / 100;
        if (duty is <= 0 or >= 1)
            return;
        if (!(Level(3) is { } third && IdealPulse.LevelDbc(duty, 3) is var ideal && third > ideal - PulseBelow && third < ideal + PulseAbove))
            return; // A sine's even harmonics make its duty factor, and not the other way round.
        job.Sheet.Add(new Finding("pulse-harmonics",
            Text($"harmonic 3 is {third:F1} dBc, and an ideal pulse of {100 * duty:F1} % duty factor has {ideal:F1} dBc: it is the shape of the wave, no distortion of a sine"), "pulse"));
        double even = IdealPulse.LevelDbc(duty, 2);
        if (Level(2) is { } second && Math.Abs(second - even) < EvenNear)
            job.Sheet.Add(new Finding("even-harmonics",
                Text($"harmonic 2 of {second:F1} dBc is what a duty factor of {100 * duty:F1} % gives ({even:F1} dBc); it falls as the duty factor nears 50 %"), "duty-factor"));
    }

    private void WriteOwn()
    {
        if (job.Plan.Chain.DistortionFloorDbc is not { } floor)
            return;
        string[] own = [.. harmonics.Where(r => r.Value <= floor).Select(r => r.Quantity.Id)];
        if (own.Length > 0)
            job.Sheet.Add(new Finding("own-distortion",
                Text($"{string.Join(", ", own)}: at the instrument's own floor of {floor:F1} dBc, so it may be made there; a filter before the input, or more attenuation, tells"),
                "instrument"));
    }

    private void WriteRollOff()
    {
        if (rollOff.Bandwidth is not { } bandwidth || harmonics.FirstOrDefault(r => rollOff.Reaches(Order(r))) is not { } first)
            return;
        job.Sheet.Add(new Finding("roll-off",
            Text($"{first.Quantity.Id} and above lie beyond {RollOff.Onset} of the chain's {Engineering.Format(bandwidth, "Hz", 3)}: they may read low, and their uncertainty says by how much"),
            "bandwidth"));
    }

    private double? Level(int order) => harmonics.FirstOrDefault(r => Order(r) == order)?.Value;

    private static int Order(Reading reading) => int.Parse(reading.Quantity.Id.AsSpan("harmonic-".Length), CultureInfo.InvariantCulture);
}
