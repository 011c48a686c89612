using MathNet.Numerics.LinearAlgebra;

namespace ScopeReader.Numerics;

/// <summary>A polynomial of low degree by least squares over many points, whose abscissas lie from -1 to 1.</summary>
/// <remarks>The points are summed, not kept. Up to degree 5 on [-1, 1] the normal equations cost four of sixteen digits.</remarks>
internal sealed class SummedPolynomial(int degree)
{
    private readonly double[] _moments = new double[2 * degree + 1], _right = new double[degree + 1];
    private double _squares;
    private Matrix<double>? _inverse;
    private double[] _coefficients = [];

    /// <summary>How many points there are.</summary>
    public double Count => _moments[0];

    /// <summary>Rms distance of the points from the polynomial.</summary>
    public double Noise { get; private set; }

    /// <summary>Adds a point.</summary>
    public void Add(double x, double y)
    {
        double power = 1;
        for (int k = 0; k < _moments.Length; k++, power *= x)
        {
            _moments[k] += power;
            if (k < _right.Length)
                _right[k] += power * y;
        }
        _squares += y * y;
    }

    /// <summary>Solves; false where the points do not determine the polynomial.</summary>
    public bool Solve()
    {
        int size = _right.Length;
        if (Count < 2 * size)
            return false;
        _inverse = Matrix<double>.Build.Dense(size, size, (a, b) => _moments[a + b]).Inverse();
        Vector<double> right = Vector<double>.Build.Dense(_right), found = _inverse * right;
        _coefficients = found.ToArray();
        Noise = Math.Sqrt(Math.Max(0, _squares - found.DotProduct(right)) / (Count - size));
        double first = 0;
        for (int k = 0; k < size; k++)
            first += _inverse[0, k] * _moments[k];
        // Points at too few places leave a matrix whose inverse is none.
        return double.IsFinite(Noise) && Math.Abs(first - 1) < 1e-6;
    }

    /// <summary>Value at a place.</summary>
    public double At(double x)
    {
        double value = 0;
        for (int k = _coefficients.Length - 1; k >= 0; k--)
            value = value * x + _coefficients[k];
        return value;
    }

    /// <summary>Slope at a place.</summary>
    public double SlopeAt(double x)
    {
        double value = 0;
        for (int k = _coefficients.Length - 1; k > 0; k--)
            value = value * x + k * _coefficients[k];
        return value;
    }

    /// <summary>Standard uncertainty of the value at a place, for noise that is white.</summary>
    public double UncertaintyAt(double x)
    {
        var powers = Vector<double>.Build.Dense(_right.Length, k => Math.Pow(x, k));
        return Noise * Math.Sqrt(Math.Max(0, powers.DotProduct(_inverse! * powers)));
    }
}
