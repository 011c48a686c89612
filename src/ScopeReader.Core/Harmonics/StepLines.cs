using ScopeReader.Numerics;

namespace ScopeReader.Harmonics;

/// <summary>Lines that a converter's steps add to a periodic wave: rounding is the same in every period unless noise spreads it.</summary>
/// <remarks>
/// The fitted wave is rounded again over one period, shifted and stretched by parts of a step, for where the true wave's top and
/// bottom lie between the codes is not known; the rms over those places is the standard uncertainty. Noise of σ turns the rounding error of step q
/// into its mean, Σ (-1)^m q/(πm) sin(2πm x/q) exp(-2π²m²σ²/q²): half a step of noise leaves a hundredth of it.
/// </remarks>
internal static class StepLines
{
    private const int Points = 4096, Places = 16;

    /// <summary>Rms of the cosine or sine part that the steps add to each harmonic.</summary>
    /// <param name="model">The fitted wave.</param>
    /// <param name="harmonics">How many are asked for.</param>
    /// <param name="step">q, in the samples' unit; 0 for none.</param>
    /// <param name="noise">σ of one sample before the converter.</param>
    /// <returns>Shape [harmonics].</returns>
    public static double[] Rms(HarmonicModel model, int harmonics, double step, double noise)
    {
        var rms = new double[harmonics];
        if (step == 0 || noise > 0.6 * step)
            return rms;
        double[] wave = OnePeriod(model);
        double bottom = wave.Min(), swing = wave.Max() - bottom;
        if (swing == 0)
            return rms;
        var error = new double[Points];
        for (int place = 0; place < Places; place++)
        {
            // Evenly spread pairs of places, by the golden section.
            double shift = (double)place / Places, stretch = place * 0.6180339887498949 % 1;
            for (int i = 0; i < Points; i++)
                error[i] = step * Rounding(wave[i] / step + shift + stretch * (wave[i] - bottom) / swing, noise / step);
            for (int k = 1; k <= harmonics; k++)
            {
                var sums = ToneSums.Of(error, (double)k / Points, timed: false);
                rms[k - 1] += (sums.Cosine * sums.Cosine + sums.Sine * sums.Sine) * 4 / ((double)Points * Points) / 2 / Places;
            }
        }
        for (int k = 0; k < harmonics; k++)
            rms[k] = Math.Sqrt(rms[k]);
        return rms;
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
        double sum = 0;
        for (int m = 1; m <= 10; m++)
            sum += (m % 2 == 0 ? 1 : -1) / (Math.PI * m) * Math.Sin(2 * Math.PI * m * x) * Math.Exp(-2 * Math.PI * Math.PI * m * m * sigma * sigma);
        return sum;
    }
}
