using MathNet.Numerics.LinearAlgebra;

namespace ScopeReader.Frequency;

/// <summary>The error of interpolating between samples, as a function of where between two samples a crossing falls.</summary>
/// <remarks>
/// Where the crossings wrap through the sample interval often enough, the first two harmonics of that function, per direction,
/// are fitted with the period, and so do not disturb it.
/// </remarks>
internal sealed class SamplePhase
{
    private const int FewestEdges = 40, FewestForThreads = 20_000;

    private readonly int[] _harmonics;
    private readonly double _half;

    private SamplePhase(int[] harmonics, double half) => (_harmonics, _half) = (harmonics, half);

    /// <summary>Change of the period that the fit asks for.</summary>
    public double PeriodChange { get; private set; }

    /// <summary>Standard uncertainty of the period for edges with a timing noise of one unit.</summary>
    public double UncertaintyFactor { get; private set; }

    /// <summary>Unknowns of the fit.</summary>
    public int Unknowns { get; private set; }

    /// <summary>Sum of squares that it leaves.</summary>
    public double SumOfSquares { get; private set; }

    /// <summary>Fits it, and takes it out of the trains' instants and origins; null where the edges do not show it.</summary>
    /// <param name="trains">The edges, on the grid of <paramref name="period"/>.</param>
    /// <param name="period">The period, samples.</param>
    /// <param name="edges">Edges that the grid rests on.</param>
    /// <param name="sumOfSquares">Sum of their squared distances from the grid.</param>
    public static SamplePhase? TakeOut(EdgeTrain[] trains, double period, int edges, double sumOfSquares)
    {
        double cycles = trains.Max(t => t.Count > 0 ? t.Numbers[^1] : 0);
        int[] harmonics = [.. Enumerable.Range(1, 2).Where(m => EdgeInterpolation.Wraps(period, cycles, m) >= EdgeInterpolation.FewestWraps)];
        if (harmonics.Length == 0 || edges < FewestEdges)
            return null;
        var phase = new SamplePhase(harmonics, cycles / 2);
        return phase.Fit([.. trains.Where(t => t.Count > 0)], period, sumOfSquares) ? phase : null;
    }

    // Columns: the cycle number from -1 to 1, and per direction a constant and the sine and cosine of each harmonic.
    private bool Fit(EdgeTrain[] trains, double period, double sumOfSquares)
    {
        int perTrain = 1 + 2 * _harmonics.Length;
        Unknowns = 1 + trains.Length * perTrain;
        var normal = new double[Unknowns, Unknowns];
        var right = new double[Unknowns];
        var sums = new Sums[trains.Length];
        EachTrain(trains, p => sums[p] = SumsOf(trains[p], period, perTrain + 1));
        for (int p = 0; p < trains.Length; p++)
            sums[p].AddTo(normal, right, 1 + p * perTrain);
        Matrix<double> inverse = Matrix<double>.Build.DenseOfArray(normal).Inverse();
        Vector<double> found = inverse * Vector<double>.Build.Dense(right);
        double sum = sumOfSquares - found.DotProduct(Vector<double>.Build.Dense(right));
        if (!double.IsFinite(sum) || !(inverse[0, 0] > 0))
            return false;
        (PeriodChange, UncertaintyFactor, SumOfSquares) = (found[0] / _half, Math.Sqrt(inverse[0, 0]) / _half, Math.Max(0, sum));
        EachTrain(trains, p =>
        {
            trains[p].Origin += found[1 + p * perTrain] - found[0];
            trains[p].Instants = Corrected(trains[p].Instants, found.SubVector(1 + p * perTrain, perTrain).ToArray());
        });
        return true;
    }

    // Each on its own, so that the sums do not depend on how many cores share the work.
    private static void EachTrain(EdgeTrain[] trains, Action<int> work)
    {
        if (trains[0].Count > FewestForThreads)
            Parallel.For(0, trains.Length, work);
        else
            for (int p = 0; p < trains.Length; p++)
                work(p);
    }

    private Sums SumsOf(EdgeTrain train, double period, int size)
    {
        var sums = new Sums(size);
        Span<double> row = stackalloc double[size];
        for (int i = 0; i < train.Count; i++)
            if (train.Used[i])
            {
                Row(row, train.Instants[i], (train.Numbers[i] - _half) / _half);
                sums.Add(row, train.Distance(i, period));
            }
        return sums;
    }

    private double[] Corrected(double[] instants, double[] fitted)
    {
        Span<double> row = stackalloc double[fitted.Length + 1];
        var corrected = new double[instants.Length];
        for (int i = 0; i < instants.Length; i++)
        {
            Row(row, instants[i], 0);
            corrected[i] = instants[i];
            for (int a = 1; a < fitted.Length; a++)
                corrected[i] -= fitted[a] * row[a + 1];
        }
        return corrected;
    }

    private void Row(Span<double> row, double instant, double cycle)
    {
        double phase = 2 * Math.PI * (instant - Math.Floor(instant));
        (row[0], row[1]) = (cycle, 1);
        var (sin, cos) = Math.SinCos(phase);
        for (int h = 0; h < _harmonics.Length; h++)
            (row[2 + 2 * h], row[3 + 2 * h]) = _harmonics[h] == 1 ? (sin, cos) : (2 * sin * cos, 1 - 2 * sin * sin);
    }

    // Products of one train's rows, the cycle number's column first.
    private sealed class Sums(int size)
    {
        private readonly double[] _products = new double[size * size], _values = new double[size];

        public void Add(ReadOnlySpan<double> row, double value)
        {
            for (int a = 0; a < row.Length; a++)
            {
                _values[a] += row[a] * value;
                for (int b = 0; b <= a; b++)
                    _products[a * row.Length + b] += row[a] * row[b];
            }
        }

        public void AddTo(double[,] normal, double[] right, int offset)
        {
            int size = _values.Length;
            for (int a = 0; a < size; a++)
            {
                int ia = a == 0 ? 0 : offset + a - 1;
                right[ia] += _values[a];
                for (int b = 0; b <= a; b++)
                {
                    int ib = b == 0 ? 0 : offset + b - 1;
                    normal[ia, ib] += _products[a * size + b];
                    if (ia != ib)
                        normal[ib, ia] = normal[ia, ib];
                }
            }
        }
    }
}
