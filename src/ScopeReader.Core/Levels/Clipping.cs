using ScopeReader.Readings;

namespace ScopeReader.Levels;

/// <summary>Looks for a wave that ran out of the converter's range.</summary>
/// <remarks>
/// Three samples or more in a row at the largest or smallest value, and many more there than a step further in. A quantised
/// parabola's top holds up to 2.4 times as many as the next code, so three times is asked for; of a sine, that its fit
/// reaches beyond the samples; of a two-state wave, that the value is not the state itself.
/// </remarks>
internal static class Clipping
{
    private const int ShortestRun = 3;
    private const double Crowding = 3, LeastShare = 0.01, BeyondState = 0.05, BeyondSine = 0.01;

    /// <summary>Writes a finding where a rail shows.</summary>
    /// <param name="job">The waveform and where findings go.</param>
    /// <param name="shape">What the first look gave.</param>
    /// <returns>The ends that cut the wave off.</returns>
    public static ClippedEnds Look(WaveformJob job, WaveShape shape)
    {
        if (shape.Kind == WaveKind.Flat)
            return ClippedEnds.None;
        bool top = IsRail(job.Waveform.Samples, shape, shape.Maximum, +1), bottom = IsRail(job.Waveform.Samples, shape, shape.Minimum, -1);
        if (!top && !bottom)
            return ClippedEnds.None;
        string where = top && bottom ? "top and bottom look" : top ? "the top looks" : "the bottom looks";
        string unit = job.Waveform.Unit;
        string at = top && bottom ? $"{Engineering.Format(shape.Maximum, unit)} and {Engineering.Format(shape.Minimum, unit)}" : Engineering.Format(top ? shape.Maximum : shape.Minimum, unit);
        job.Sheet.Add(new Finding("clipping-suspected",
            $"{where} cut off at {at}: samples stay there and crowd; levels, overshoot and harmonics may be the instrument's; use a larger vertical range", top && bottom ? "both" : top ? "top" : "bottom"));
        return (top ? ClippedEnds.Top : 0) | (bottom ? ClippedEnds.Bottom : 0);
    }

    private static bool IsRail(ReadOnlySpan<double> samples, WaveShape shape, double rail, int sign)
    {
        double range = shape.Maximum - shape.Minimum, width = Math.Max(shape.Step, range / 256), state = sign > 0 ? shape.Upper : shape.Lower;
        double beyond = sign * (rail - state);
        if (shape.Kind == WaveKind.TwoState ? beyond < BeyondState * shape.Swing : shape.Kind == WaveKind.Sinusoidal && beyond > -BeyondSine * shape.Swing / 2)
            return false;
        int run = 0, longest = 0, atRail = 0, nextTo = 0;
        foreach (double value in samples)
        {
            double distance = Math.Abs(value - rail);
            run = distance <= 1e-9 * range ? run + 1 : 0;
            longest = Math.Max(longest, run);
            atRail += distance < width / 2 ? 1 : 0;
            nextTo += distance >= width / 2 && distance < 1.5 * width ? 1 : 0;
        }
        return longest >= ShortestRun && atRail > Crowding * nextTo && atRail >= LeastShare * samples.Length;
    }
}
