namespace ScopeReader.Numerics;

/// <summary>A transform whose length has no prime factor above 5: Stockham's self-sorting form in stages of 4, 5, 3 and 2.</summary>
/// <remarks>The form is described in C. Van Loan, Computational Frameworks for the Fast Fourier Transform, 1992, chapter 1 (from memory).</remarks>
internal sealed class SmoothTransform : ComplexTransform
{
    private readonly List<Stage> _stages = [];
    private readonly double[] _workRe, _workIm;

    public SmoothTransform(int length)
    {
        (_workRe, _workIm) = (new double[length], new double[length]);
        (double[] cosine, double[] sine) = TurnTable.Of(length, length);
        int rest = length;
        foreach (int radix in (ReadOnlySpan<int>)[4, 5, 3, 2])
            for (; rest % radix == 0; rest /= radix)
                _stages.Add(new Stage(radix, rest, cosine, sine));
        if (rest != 1)
            throw new ArgumentException($"{length} has a prime factor above 5", nameof(length));
    }

    public static bool IsSmooth(int length)
    {
        foreach (int factor in (ReadOnlySpan<int>)[2, 3, 5])
            while (length % factor == 0)
                length /= factor;
        return length == 1;
    }

    public override void Forward(double[] re, double[] im)
    {
        (double[] Re, double[] Im) from = (re, im), to = (_workRe, _workIm);
        int stride = 1;
        foreach (Stage stage in _stages)
        {
            stage.Run(from.Re, from.Im, to.Re, to.Im, stride);
            stride *= stage.Radix;
            (from, to) = (to, from);
        }
        if (from.Re != re)
        {
            from.Re.CopyTo(re, 0);
            from.Im.CopyTo(im, 0);
        }
    }

    private sealed class Stage
    {
        private readonly double[] _twiddleRe, _twiddleIm;
        private readonly int _count;

        // The turn is divided into the whole transform's parts, of which this stage's length takes every so manieth.
        public Stage(int radix, int length, double[] cosine, double[] sine)
        {
            (Radix, _count) = (radix, length / radix);
            (_twiddleRe, _twiddleIm) = (new double[(radix - 1) * _count], new double[(radix - 1) * _count]);
            int step = cosine.Length / length;
            for (int leg = 1; leg < radix; leg++)
                for (int p = 0; p < _count; p++)
                {
                    int at = p * leg * step;
                    (_twiddleRe[(leg - 1) * _count + p], _twiddleIm[(leg - 1) * _count + p]) = (cosine[at], -sine[at]);
                }
        }

        public int Radix { get; }

        public void Run(double[] inRe, double[] inIm, double[] outRe, double[] outIm, int stride)
        {
            switch (Radix)
            {
                case 4 when stride == 1 && _count % 4 == 0:
                    Stockham.FirstOfFour(inRe, inIm, outRe, outIm, _twiddleRe, _twiddleIm, _count);
                    break;
                case 4:
                    Stockham.Stage<Radix4>(inRe, inIm, outRe, outIm, _twiddleRe, _twiddleIm, _count, stride);
                    break;
                case 5:
                    Stockham.Stage<Radix5>(inRe, inIm, outRe, outIm, _twiddleRe, _twiddleIm, _count, stride);
                    break;
                case 3:
                    Stockham.Stage<Radix3>(inRe, inIm, outRe, outIm, _twiddleRe, _twiddleIm, _count, stride);
                    break;
                default:
                    Stockham.Stage<Radix2>(inRe, inIm, outRe, outIm, _twiddleRe, _twiddleIm, _count, stride);
                    break;
            }
        }
    }
}
