using ScopeReader.Numerics;

namespace ScopeReader.Harmonics;

/// <summary>Lines that a converter's steps add to a periodic wave: rounding is the same in every period unless noise spreads it.</summary>
/// <remarks>
/// The fitted wave is rounded again over one period, shifted and stretched by parts of a step, for where the true wave's top and
/// bottom lie between the codes is not known; the largest line over those places bounds the error. Noise of σ turns the rounding
/// error of step q into its mean, Σ (-1)^m q/(πm) sin(2πm x/q) exp(-2π²m²σ²/q²): half a step of noise leaves a hundredth of it.
/// An error that stays within ±e makes a line of at most 4e/π, that of a square wave in step with it: 2q/π without any noise.
/// </remarks>
internal static class StepLines
{
    private const int Points = 4096, Places = 64, MostTerms = 10;
    private const double SpreadByNoise = 0.6;

    /// <summary>What the steps add to each harmonic.</summary>
    /// <param name="model">The fitted wave.</param>
    /// <param name="harmonics">How many are asked for.</param>
    /// <param name="step">q, in the samples' unit; 0 for none.</param>
    /// <param name="noise">σ of one sample before the converter.</param>
    /// <returns>Shape [harmonics].</returns>
    public static StepError[] Of(HarmonicModel model, int harmonics, double step, double noise)
    {
        var errors = new StepError[harmonics];
        if (step == 0 || noise > SpreadByNoise * step)
            return errors;
        double[] wave = OnePeriod(model);
        double bottom = wave.Min(), swing = wave.Max() - bottom;
        if (swing == 0)
            return errors;
        double[] error = new double[Points], likely = new double[harmonics];
        for (int place = 0; place < Places; place++)
        {
            // Evenly spread pairs of places, by the golden section.
            double shift = (double)place / Places, stretch = place * 0.6180339887498949 % 1;
            for (int i = 0; i < Points; i++)
                error[i] = step * Rounding(wave[i] / step + shift + stretch * (wave[i] - bottom) / swing, noise / step);
            for (int k = 1; k <= harmonics; k++)
            {
                var sums = ToneSums.Of(error, (double)k / Points, timed: false);
                likely[k - 1] = Math.Max(likely[k - 1], 2.0 / Points * double.Hypot(sums.Cosine, sums.Sine));
            }
        }
        double most = 4 / Math.PI * step * Largest(noise / step);
        for (int k = 0; k < harmonics; k++)
            errors[k] = new StepError(likely[k], most);
        return errors;
    }

    // The largest mean rounding error, steps.
    private static double Largest(double sigma)
    {
        double largest = 0;
        for (int i = 0; i <= 64; i++)
            largest = Math.Max(largest, Math.Abs(Rounding(i / 128.0, sigma)));
        return largest;
    }

    private static double[] OnePeriod(HarmonicModel model)
    {
        var wave = new double[Points];
        for (int i = 0; i < Points; i++)
        {
            double value = model.Offset;
            for (int k = 1; k <= model.Harmonics; k++)
            {
                (double c, double s) = Turn.Of((long)k * i, Points);
                value += model.Cosines[k - 1] * c + model.Sines[k - 1] * s;
            }
            wave[i] = value;
        }
        return wave;
    }

    // In steps. Without noise, rounding itself: the series would ring.
    private static double Rounding(double x, double sigma)
    {
        if (sigma < 0.05)
            return Math.Round(x) - x;
        // Terms beyond 0.7 steps of noise have under 1e-4 left.
        int terms = Math.Min(MostTerms, (int)(0.7 / sigma) + 1);
        double sum = 0;
        for (int m = 1; m <= terms; m++)
            sum += (m % 2 == 0 ? 1 : -1) / (Math.PI * m) * Math.Sin(2 * Math.PI * m * x) * Math.Exp(-2 * Math.PI * Math.PI * m * m * sigma * sigma);
        return sum;
    }
}
