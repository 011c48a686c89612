namespace ScopeReader.Numerics;

/// <summary>A straight line or a parabola through points, by least squares.</summary>
/// <remarks>
/// <para>Normal equations about the mean of x, summed and solved in doubled precision: centring takes out most of the
/// cancellation and the doubled digits the rest. Checked against NIST StRD.</para>
/// <para>Uncertainties are for equal, independent scatter of y, estimated from the residuals; x counts as exact.</para>
/// </remarks>
public sealed class PolynomialFit
{
    private readonly double[,] _covariance; // of the centred coefficients, for unit scatter
    private readonly double[] _centred;

    private PolynomialFit(int firstPower, double centre, double[] centred, double[,] covariance, double[] coefficients, double[] roots, double residuals, int points)
    {
        (FirstPower, Centre, _centred, _covariance) = (firstPower, centre, centred, covariance);
        (Coefficients, ResidualSumOfSquares, DegreesOfFreedom) = (coefficients, residuals, points - centred.Length);
        StandardUncertainties = [.. roots.Select(r => r * ResidualDeviation)];
    }

    /// <summary>Coefficients of x⁰, x¹ … (of x¹ alone for a line through the origin).</summary>
    public IReadOnlyList<double> Coefficients { get; }

    /// <summary>Their standard uncertainties; NaN without degrees of freedom.</summary>
    public IReadOnlyList<double> StandardUncertainties { get; }

    /// <summary>0, or 1 for a line through the origin.</summary>
    public int FirstPower { get; }

    /// <summary>The x about which the fit was made.</summary>
    public double Centre { get; }

    /// <summary>Sum of the squared residuals.</summary>
    public double ResidualSumOfSquares { get; }

    /// <summary>Points less coefficients.</summary>
    public int DegreesOfFreedom { get; }

    /// <summary>Standard deviation of the points about the curve; NaN without degrees of freedom.</summary>
    public double ResidualDeviation => DegreesOfFreedom > 0 ? Math.Sqrt(ResidualSumOfSquares / DegreesOfFreedom) : double.NaN;

    /// <summary>The curve at x.</summary>
    public double At(double x)
    {
        double value = 0;
        for (int k = _centred.Length - 1; k >= 0; k--)
            value = value * (x - Centre) + _centred[k];
        return FirstPower == 1 ? value * (x - Centre) : value;
    }

    /// <summary>Standard uncertainty of the curve at x.</summary>
    public double UncertaintyAt(double x)
    {
        double variance = 0;
        for (int i = 0; i < _centred.Length; i++)
            for (int j = 0; j < _centred.Length; j++)
                variance += _covariance[i, j] * Math.Pow(x - Centre, i + j + 2 * FirstPower);
        return ResidualDeviation * Math.Sqrt(variance);
    }

    /// <summary>Standard uncertainty of one more point at x: the curve's, and the points' own scatter.</summary>
    public double PredictionUncertaintyAt(double x) => double.Hypot(UncertaintyAt(x), ResidualDeviation);

    /// <summary>Fits a polynomial.</summary>
    /// <param name="x">Shape [n], finite, as many different values as there are coefficients.</param>
    /// <param name="y">Shape [n], finite.</param>
    /// <param name="degree">1 or 2.</param>
    /// <param name="throughOrigin">True for y = b·x; degree 1 only.</param>
    /// <exception cref="ArgumentException">Too few different x, or lengths that differ.</exception>
    public static PolynomialFit Of(ReadOnlySpan<double> x, ReadOnlySpan<double> y, int degree, bool throughOrigin = false)
    {
        ArgumentOutOfRangeException.ThrowIfNotEqual(y.Length, x.Length, nameof(y));
        ArgumentOutOfRangeException.ThrowIfLessThan(degree, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(degree, throughOrigin ? 1 : 2);
        int first = throughOrigin ? 1 : 0, size = degree + 1 - first;
        if (x.ToArray().Distinct().Count() < size)
            throw new ArgumentException($"a fit of {size} coefficients needs {size} different points or more", nameof(x));

        double centre = throughOrigin ? 0 : SampleSummary.Of(x).Mean;
        var moments = new DoubleDouble[2 * degree + 1];
        var right = new DoubleDouble[size];
        for (int i = 0; i < x.Length; i++)
        {
            DoubleDouble power = 1, u = (DoubleDouble)x[i] - centre;
            for (int k = 0; k < moments.Length; k++, power *= u)
            {
                moments[k] += power;
                if (k >= first && k <= degree)
                    right[k - first] += power * y[i];
            }
        }
        var matrix = new DoubleDouble[size, size];
        for (int i = 0; i < size; i++)
            for (int j = 0; j < size; j++)
                matrix[i, j] = moments[i + j + 2 * first];
        DoubleDouble[,] inverse = Inverse(matrix);
        DoubleDouble[] centred = Times(inverse, right);
        return Make(x, y, first, centre, centred, inverse);
    }

    private static PolynomialFit Make(ReadOnlySpan<double> x, ReadOnlySpan<double> y, int first, double centre, DoubleDouble[] centred, DoubleDouble[,] inverse)
    {
        int size = centred.Length;
        DoubleDouble squares = 0;
        for (int i = 0; i < x.Length; i++)
        {
            DoubleDouble u = (DoubleDouble)x[i] - centre, value = 0;
            for (int k = size - 1; k >= 0; k--)
                value = value * u + centred[k];
            DoubleDouble residual = y[i] - (first == 1 ? value * u : value);
            squares += residual * residual;
        }
        DoubleDouble[,] shift = Shift(size, first == 1 ? 0 : centre);
        var roots = new double[size];
        for (int i = 0; i < size; i++)
        {
            DoubleDouble variance = 0;
            for (int j = 0; j < size; j++)
                for (int k = 0; k < size; k++)
                    variance += shift[i, j] * inverse[j, k] * shift[i, k];
            roots[i] = Math.Sqrt((double)variance);
        }
        var covariance = new double[size, size];
        for (int i = 0; i < size; i++)
            for (int j = 0; j < size; j++)
                covariance[i, j] = (double)inverse[i, j];
        return new PolynomialFit(first, centre, [.. centred.Select(c => (double)c)], covariance, [.. Times(shift, centred).Select(c => (double)c)], roots, (double)squares, x.Length);
    }

    // From powers of x − c to powers of x: (x − c)^k = Σ binomial(k, j) (−c)^(k−j) x^j.
    private static DoubleDouble[,] Shift(int size, double centre)
    {
        var shift = new DoubleDouble[size, size];
        for (int k = 0; k < size; k++)
        {
            DoubleDouble term = 1;
            for (int j = k; j >= 0; j--)
            {
                shift[j, k] = term;
                term = term * -centre * j / (k - j + 1);
            }
        }
        return shift;
    }

    private static DoubleDouble[] Times(DoubleDouble[,] matrix, DoubleDouble[] vector)
    {
        var product = new DoubleDouble[vector.Length];
        for (int i = 0; i < vector.Length; i++)
            for (int j = 0; j < vector.Length; j++)
                product[i] += matrix[i, j] * vector[j];
        return product;
    }

    // Gauss and Jordan without exchange of rows: the matrix is symmetric and positive definite.
    private static DoubleDouble[,] Inverse(DoubleDouble[,] matrix)
    {
        int size = matrix.GetLength(0);
        var inverse = new DoubleDouble[size, size];
        for (int i = 0; i < size; i++)
            inverse[i, i] = 1;
        for (int pivot = 0; pivot < size; pivot++)
        {
            DoubleDouble scale = matrix[pivot, pivot];
            for (int j = 0; j < size; j++)
                (matrix[pivot, j], inverse[pivot, j]) = (matrix[pivot, j] / scale, inverse[pivot, j] / scale);
            for (int i = 0; i < size; i++)
            {
                if (i == pivot)
                    continue;
                DoubleDouble factor = matrix[i, pivot];
                for (int j = 0; j < size; j++)
                    (matrix[i, j], inverse[i, j]) = (matrix[i, j] - factor * matrix[pivot, j], inverse[i, j] - factor * inverse[pivot, j]);
            }
        }
        return inverse;
    }
}
