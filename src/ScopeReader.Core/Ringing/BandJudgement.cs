using System.Numerics;

namespace ScopeReader.Ringing;

/// <summary>What one band of frequencies holds on the levels between the edges.</summary>
/// <param name="Rings">True where the edges start something in it that dies away.</param>
/// <param name="Tone">A steady sine in it; null for none.</param>
/// <param name="IsNoise">True where it holds more than white noise that is neither.</param>
/// <param name="LateToEarly">Envelope of what the edges have in common, last window over first.</param>
/// <param name="Resultant">Length of the mean of the unit vectors of the phases after each edge.</param>
/// <param name="Edges">Edges behind <paramref name="Resultant"/>.</param>
internal sealed record BandJudgement(bool Rings, FoundTone? Tone, bool IsNoise, double LateToEarly, double Resultant, int Edges)
{
    // Power over that of white noise from which a band is worth a look; edges in common, and shares, from which it is sure.
    private const double Excess = 2, SteadyShare = 0.5, RestartingShare = 0.9, Chance = 1e-5, ForTheGrid = 8;

    // Power about the mean over that of the mean which noise in the edges' instants explains.
    private const double MovedShare = 0.03;

    private const int OtherBands = 8;

    /// <summary>Cycles in a window.</summary>
    public const double Cycles = 2.5;

    // Fewer than these cycles in a window, or windows on a level, and early and late cannot be told apart.
    private const double FewestCycles = 1.5, WindowsOnALevel = 3;

    /// <summary>Judges a band.</summary>
    /// <param name="samples">The record.</param>
    /// <param name="spans">Its levels.</param>
    /// <param name="frequency">Middle of the band, cycles per sample.</param>
    /// <returns>Null where the levels are too short for this frequency.</returns>
    public static BandJudgement? Of(ReadOnlySpan<double> samples, IReadOnlyList<LevelSpan> spans, double frequency) => Of(samples, spans, frequency, isSettled: false);

    private static BandJudgement? Of(ReadOnlySpan<double> samples, IReadOnlyList<LevelSpan> spans, double frequency, bool isSettled)
    {
        double[] lengths = [.. spans.Select(s => s.Length).Order()];
        double width = Math.Min(Cycles / frequency, lengths[lengths.Length / 10] / WindowsOnALevel);
        if (width * frequency < FewestCycles)
            return null;
        // What stays, stays at one frequency: windows that are off it would see it turn, which decays look like.
        SteadyTone late = Late(samples, spans, frequency, width);
        if (!isSettled && late.Share > SteadyShare)
            return Of(samples, spans, late.Frequency, isSettled: true);
        var windows = new BandWindows(samples, spans, frequency, width);
        double white = White(samples, spans, frequency, width);
        var common = CommonPart.Of(windows, windows.Values);
        FoundTone? tone = null;
        bool noise = false;
        double excess = common.Scatter / white;
        // Edges that noise has moved turn what they have in common a little, level by level.
        double strongest = common.Mean.SelectMany(m => m).Select(m => m.Magnitude).DefaultIfEmpty(0).Max();
        if (excess > Excess && common.Scatter - white > MovedShare * strongest * strongest)
        {
            SteadyTone ofRest = SteadyTone.Of(windows, common.Rest), found = late.Share > SteadyShare ? late : ofRest;
            if (found.Beside(windows, common.Rest) is { } beside && Without(windows, beside) is var parted && Explains(common.Scatter, parted.Scatter, white))
            {
                common = parted;
                tone = FoundTone.Of(windows, beside, common.Scatter);
            }
            // Of the power, the part that is not white noise.
            else if (ofRest.AnewShare / (1 - 1 / excess) > RestartingShare)
                tone = FoundTone.Anew(windows, ofRest.AnewFrequency, common.Rest);
            else
                noise = true;
        }
        bool rings = false;
        foreach (bool high in (ReadOnlySpan<bool>)[false, true])
        {
            int slots = windows.Slots(high), edges = windows.Edges(high);
            if (slots < 3 || edges < 2)
                continue;
            double independent = slots / common.Correlated(windows, high), freedom = 2 * (edges - 1) * independent;
            double variance = common.Scatter / 2 / edges * (slots / independent);
            var fit = DecayingAndSteady.Of(common.Mean[high ? 1 : 0], variance, windows.Steps[high ? 1 : 0], width);
            double limit = 2 * FQuantile(freedom);
            rings |= fit.Decaying > limit + ForTheGrid;
            if (fit.Steady > limit && fit.SteadyAmplitude > 0.1 * fit.DecayingAmplitude)
                tone = (tone ?? FoundTone.OfLate(samples, spans, frequency, width, common.Scatter)).With(high, fit.SteadyAmplitude);
        }
        var (lateToEarly, resultant, count) = common.Phases(windows);
        return new BandJudgement(rings, tone, noise && tone is null, lateToEarly, resultant, count);
    }

    // The sine that the later halves of the levels have, where ringing has died away.
    private static SteadyTone Late(ReadOnlySpan<double> samples, IReadOnlyList<LevelSpan> spans, double frequency, double width)
    {
        LevelSpan[] halves = [.. spans.Select(s => s with { From = s.From + s.Length / 2, Length = s.Length / 2 })];
        var windows = new BandWindows(samples, halves, frequency, width);
        return SteadyTone.Of(windows, windows.Values);
    }

    // What is left of the windows without a sine.
    private static CommonPart Without(BandWindows windows, SteadyTone tone)
    {
        var without = new Complex[windows.Count];
        for (int i = 0; i < without.Length; i++)
            without[i] = windows.Values[i] - tone.In(windows, i);
        return CommonPart.Of(windows, without);
    }

    // The sine is what there is where most of the power beyond white noise goes with it.
    private static bool Explains(double before, double after, double white) => before - after > SteadyShare * (before - white);

    // Median over bands elsewhere: white noise is the same in all of them.
    private static double White(ReadOnlySpan<double> samples, IReadOnlyList<LevelSpan> spans, double frequency, double width)
    {
        var scatters = new List<double>(OtherBands);
        for (int i = 0; i < OtherBands; i++)
        {
            double other = 0.06 + i * 0.38 / (OtherBands - 1);
            if (Math.Abs(other - frequency) < 0.4 * frequency || other * width < Cycles)
                continue;
            var windows = new BandWindows(samples, spans, other, width);
            scatters.Add(CommonPart.Of(windows, windows.Values).Scatter);
        }
        if (scatters.Count == 0)
            return 1e-300;
        scatters.Sort();
        return Math.Max(scatters[scatters.Count / 2], 1e-300);
    }

    // Of F with 2 and ν degrees of freedom, closed form: P(F > x) = (1 + 2x/ν)^(−ν/2).
    private static double FQuantile(double freedom) => freedom / 2 * (Math.Pow(Chance, -2 / freedom) - 1);
}
