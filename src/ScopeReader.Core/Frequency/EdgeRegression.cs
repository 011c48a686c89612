using MathNet.Numerics.LinearAlgebra;

namespace ScopeReader.Frequency;

/// <summary>The period of edges by least squares over their index, rising and falling edges with a common period.</summary>
/// <remarks>
/// <para>u(P) = σ √(12/(M(M² − 1))) for M edges of one polarity with white timing noise σ. A mid level off centre moves the
/// two polarities apart and leaves the period alone.</para>
/// <para>An edge's number is the sum of single rounded differences: a rounded distance from the first edge would slip a cycle
/// as soon as the first guess of the period is wrong by 1/(2M).</para>
/// <para>The error of interpolating between samples is a function of where between two samples the crossing falls. Where
/// the crossings wrap through the sample interval often enough, the first two harmonics of that function, per polarity,
/// are fitted with the period, and so do not disturb it.</para>
/// </remarks>
public sealed class EdgeRegression
{
    private const int Guessed = 10001, WanderBlocks = 10, FewestForWander = 50, FewestForPhase = 40;
    private const double OutlierMultiple = 8, LeastStray = 0.05, WanderLimit = 3;

    private readonly double[][] _instants;
    private readonly int[][] _cycles;
    private readonly bool[][] _used;
    private readonly double[] _origins = new double[2];

    private EdgeRegression(double[][] instants, int[][] cycles)
    {
        (_instants, _cycles) = (instants, cycles);
        _used = [.. instants.Select(t => AllUsed(t.Length))];
    }

    /// <summary>The period, in the unit of the instants.</summary>
    public double Period { get; private set; }

    /// <summary>Its standard uncertainty from the edges' distance to the grid; infinite where no edge is to spare.</summary>
    public double PeriodUncertainty { get; private set; }

    /// <summary>Standard uncertainty of the period for edges with a timing noise of one unit.</summary>
    public double UncertaintyFactor { get; private set; }

    /// <summary>Degrees of freedom of <see cref="PeriodUncertainty"/>.</summary>
    public int DegreesOfFreedom { get; private set; }

    /// <summary>Rms distance of the edges from the grid; 0 where no edge is to spare.</summary>
    public double Spread { get; private set; }

    /// <summary>Instant of rising edge 0 on the grid; null without rising edges.</summary>
    public double? RisingOrigin => _instants[0].Length > 0 ? _origins[0] : null;

    /// <summary>Instant of falling edge 0 on the grid; null without falling edges.</summary>
    public double? FallingOrigin => _instants[1].Length > 0 ? _origins[1] : null;

    /// <summary>Edges that the fit rests on.</summary>
    public int Edges { get; private set; }

    /// <summary>Edges that lie so far from the grid that they were left out.</summary>
    public int Outliers { get; private set; }

    /// <summary>Fits the period.</summary>
    /// <param name="rising">Instants of the rising edges, rising, in samples where <paramref name="samplePhase"/> is asked for.</param>
    /// <param name="falling">Instants of the falling edges, rising.</param>
    /// <param name="samplePhase">Fit the error of interpolation too.</param>
    /// <returns>Null where no polarity has two edges.</returns>
    public static EdgeRegression? Fit(double[] rising, double[] falling, bool samplePhase = true)
    {
        ArgumentNullException.ThrowIfNull(rising);
        ArgumentNullException.ThrowIfNull(falling);
        if (rising.Length < 2 && falling.Length < 2)
            return null;
        double guess = Guess(rising, falling);
        var fit = new EdgeRegression([rising, falling], [Number(rising, guess), Number(falling, guess)]);
        if (!fit.Line())
            return null;
        if (fit.LeaveOutliersOut() && !fit.Line())
            return null;
        if (samplePhase)
            fit.RemoveInterpolation();
        fit.WidenForWander();
        return fit;
    }

    // The median of the distances between neighbours of one polarity stands missing and extra edges.
    private static double Guess(double[] rising, double[] falling)
    {
        double[] longer = rising.Length >= falling.Length ? rising : falling;
        int count = Math.Min(Guessed, longer.Length - 1);
        var differences = new double[count];
        for (int i = 0; i < count; i++)
        {
            int at = (int)((long)i * (longer.Length - 1) / count);
            differences[i] = longer[at + 1] - longer[at];
        }
        Array.Sort(differences);
        return (differences[(count - 1) / 2] + differences[count / 2]) / 2;
    }

    private static int[] Number(double[] instants, double period)
    {
        var cycles = new int[instants.Length];
        for (int i = 1; i < instants.Length; i++)
            cycles[i] = cycles[i - 1] + (int)Math.Round((instants[i] - instants[i - 1]) / period);
        return cycles;
    }

    // Sums about the middle of the record: an instant late in it has few digits to spare.
    private bool Line()
    {
        double sxx = 0, sxy = 0;
        var meanCycle = new double[2];
        var meanInstant = new double[2];
        Edges = 0;
        int polarities = 0;
        for (int g = 0; g < 2; g++)
        {
            double n = 0, cycle = 0, instant = 0, first = _instants[g].Length > 0 ? _instants[g][0] : 0;
            for (int i = 0; i < _instants[g].Length; i++)
                if (_used[g][i])
                    (n, cycle, instant) = (n + 1, cycle + _cycles[g][i], instant + (_instants[g][i] - first));
            if (n == 0)
                continue;
            polarities++;
            Edges += (int)n;
            (meanCycle[g], meanInstant[g]) = (cycle / n, first + instant / n);
            for (int i = 0; i < _instants[g].Length; i++)
                if (_used[g][i])
                {
                    double x = _cycles[g][i] - meanCycle[g];
                    sxx += x * x;
                    sxy += x * (_instants[g][i] - meanInstant[g]);
                }
        }
        if (!(sxx > 0))
            return false;
        Period = sxy / sxx;
        for (int g = 0; g < 2; g++)
            _origins[g] = meanInstant[g] - Period * meanCycle[g];
        UncertaintyFactor = 1 / Math.Sqrt(sxx);
        DegreesOfFreedom = Edges - 1 - polarities;
        SetSpread(SumOfSquares());
        return Period > 0;
    }

    private double Residual(int g, int i) => _instants[g][i] - _origins[g] - Period * _cycles[g][i];

    private double SumOfSquares()
    {
        double sum = 0;
        for (int g = 0; g < 2; g++)
            for (int i = 0; i < _instants[g].Length; i++)
                if (_used[g][i])
                    sum += Residual(g, i) * Residual(g, i);
        return sum;
    }

    private void SetSpread(double sumOfSquares)
    {
        Spread = DegreesOfFreedom > 0 ? Math.Sqrt(sumOfSquares / DegreesOfFreedom) : 0;
        PeriodUncertainty = DegreesOfFreedom > 0 ? Spread * UncertaintyFactor : double.PositiveInfinity;
    }

    private bool LeaveOutliersOut()
    {
        if (Edges < 10)
            return false;
        double furthest = 0;
        for (int g = 0; g < 2; g++)
            for (int i = 0; i < _instants[g].Length; i++)
                furthest = Math.Max(furthest, Math.Abs(Residual(g, i)));
        // Only clear strays: a rounding pattern can have a median of nothing.
        if (furthest < LeastStray * Period)
            return false;
        var distances = new double[Edges];
        int k = 0;
        for (int g = 0; g < 2; g++)
            for (int i = 0; i < _instants[g].Length; i++)
                distances[k++] = Math.Abs(Residual(g, i));
        Array.Sort(distances);
        double most = Math.Max(OutlierMultiple * 1.4826 * distances[Edges / 2], LeastStray * Period);
        for (int g = 0; g < 2; g++)
            for (int i = 0; i < _instants[g].Length; i++)
                if (Math.Abs(Residual(g, i)) > most)
                {
                    _used[g][i] = false;
                    Outliers++;
                }
        return Outliers > 0;
    }

    private void RemoveInterpolation()
    {
        double cycles = Math.Max(_cycles[0].Length > 0 ? _cycles[0][^1] : 0, _cycles[1].Length > 0 ? _cycles[1][^1] : 0);
        int[] harmonics = [.. Enumerable.Range(1, 2).Where(m => EdgeInterpolation.Wraps(Period, cycles, m) >= EdgeInterpolation.FewestWraps)];
        int[] groups = [.. Enumerable.Range(0, 2).Where(g => _instants[g].Length > 0)];
        if (harmonics.Length == 0 || Edges < FewestForPhase)
            return;

        // Columns: the cycle number from -1 to 1, and per polarity a constant and the sine and cosine of each harmonic.
        int perGroup = 1 + 2 * harmonics.Length, size = 1 + groups.Length * perGroup;
        var normal = new double[size, size];
        var right = new double[size];
        var row = new double[perGroup + 1];
        double half = cycles / 2;
        for (int p = 0; p < groups.Length; p++)
        {
            int g = groups[p], offset = 1 + p * perGroup;
            for (int i = 0; i < _instants[g].Length; i++)
            {
                if (!_used[g][i])
                    continue;
                Row(row, harmonics, _instants[g][i], (_cycles[g][i] - half) / half);
                double residual = Residual(g, i);
                for (int a = 0; a <= perGroup; a++)
                {
                    int ia = a == 0 ? 0 : offset + a - 1;
                    right[ia] += row[a] * residual;
                    for (int b = 0; b <= a; b++)
                        normal[ia, b == 0 ? 0 : offset + b - 1] += row[a] * row[b];
                }
            }
        }
        for (int a = 0; a < size; a++)
            for (int b = a + 1; b < size; b++)
                normal[a, b] = normal[b, a];
        Matrix<double> inverse = Matrix<double>.Build.DenseOfArray(normal).Inverse();
        Vector<double> found = inverse * Vector<double>.Build.Dense(right);
        double sum = SumOfSquares() - found.DotProduct(Vector<double>.Build.Dense(right));
        if (!double.IsFinite(sum) || !(inverse[0, 0] > 0))
            return;
        Period += found[0] / half;
        for (int p = 0; p < groups.Length; p++)
            _origins[groups[p]] += found[1 + p * perGroup] - found[0];
        UncertaintyFactor = Math.Sqrt(inverse[0, 0]) / half;
        DegreesOfFreedom = Edges - size;
        SetSpread(Math.Max(0, sum));
        for (int p = 0; p < groups.Length; p++)
            _instants[groups[p]] = Corrected(_instants[groups[p]], harmonics, found.SubVector(1 + p * perGroup, perGroup));
    }

    private static double[] Corrected(double[] instants, int[] harmonics, Vector<double> fitted)
    {
        var row = new double[fitted.Count + 1];
        var corrected = new double[instants.Length];
        for (int i = 0; i < instants.Length; i++)
        {
            Row(row, harmonics, instants[i], 0);
            corrected[i] = instants[i];
            for (int a = 1; a < fitted.Count; a++)
                corrected[i] -= fitted[a] * row[a + 1];
        }
        return corrected;
    }

    private static void Row(double[] row, int[] harmonics, double instant, double cycle)
    {
        double phase = 2 * Math.PI * (instant - Math.Floor(instant));
        (row[0], row[1]) = (cycle, 1);
        var (sin, cos) = Math.SinCos(phase);
        for (int h = 0; h < harmonics.Length; h++)
            (row[2 + 2 * h], row[3 + 2 * h]) = harmonics[h] == 1 ? (sin, cos) : (2 * sin * cos, 1 - 2 * sin * sin);
    }

    private static bool[] AllUsed(int count)
    {
        var used = new bool[count];
        Array.Fill(used, true);
        return used;
    }

    // Slow wander of the phase (a real oscillator's, or the digitiser's) leaves residuals that stay on one side for a while:
    // their means over tenths of the record are then larger than white noise makes them, and so is u(P).
    private void WidenForWander()
    {
        if (Edges < FewestForWander || !(Spread > 0))
            return;
        var sums = new double[WanderBlocks];
        var counts = new int[WanderBlocks];
        for (int g = 0; g < 2; g++)
            for (int i = 0; i < _instants[g].Length; i++)
                if (_used[g][i])
                {
                    int block = (int)((long)i * WanderBlocks / _instants[g].Length);
                    sums[block] += Residual(g, i);
                    counts[block]++;
                }
        double ratio = 0;
        for (int b = 0; b < WanderBlocks; b++)
            if (counts[b] > 0)
                ratio += sums[b] * sums[b] / counts[b] / (Spread * Spread);
        ratio /= WanderBlocks - 2;
        if (ratio <= WanderLimit)
            return;
        // Steps from block mean to block mean are independent for white frequency noise, the least that wander can be.
        double cycles = (double)Edges / WanderBlocks / (_instants.Count(t => t.Length > 0)), squares = 0;
        for (int b = 1; b < WanderBlocks; b++)
        {
            double step = (sums[b] / counts[b] - sums[b - 1] / counts[b - 1]) / cycles;
            squares += step * step;
        }
        PeriodUncertainty = Math.Max(PeriodUncertainty, Math.Sqrt(squares / (WanderBlocks - 2) / (WanderBlocks - 1)));
        DegreesOfFreedom = WanderBlocks - 2;
    }
}
