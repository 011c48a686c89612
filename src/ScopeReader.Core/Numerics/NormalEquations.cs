namespace ScopeReader.Numerics;

/// <summary>Weighted linear least squares with a few unknowns, one observation at a time.</summary>
/// <remarks>
/// Cholesky factor of the normal equations, columns scaled to length 1 first: good while the condition of the scaled
/// columns stays under 1e6, which centred polynomials of low order and sinusoids over a cycle or more do.
/// </remarks>
internal sealed class NormalEquations
{
    private readonly int _size;
    private readonly double[,] _matrix;
    private readonly double[] _right, _scale;

    /// <param name="size">Number of unknowns.</param>
    public NormalEquations(int size) => (_size, _matrix, _right, _scale) = (size, new double[size, size], new double[size], new double[size]);

    /// <summary>Forgets every observation.</summary>
    public void Clear()
    {
        Array.Clear(_matrix);
        Array.Clear(_right);
    }

    /// <summary>Adds an observation.</summary>
    /// <param name="row">Shape [unknowns]: change of the observation with each unknown.</param>
    /// <param name="value">The observation.</param>
    /// <param name="weight">1 over its variance, or in proportion to it.</param>
    public void Add(ReadOnlySpan<double> row, double value, double weight)
    {
        for (int i = 0; i < _size; i++)
        {
            double w = weight * row[i];
            _right[i] += w * value;
            for (int j = 0; j <= i; j++)
                _matrix[i, j] += w * row[j];
        }
    }

    /// <summary>The factor, for solutions; null where the observations do not determine the unknowns.</summary>
    /// <param name="damping">Added to the diagonal, of its own size: the step of Levenberg and Marquardt.</param>
    public double[,]? Factor(double damping = 0)
    {
        var factor = new double[_size, _size];
        for (int i = 0; i < _size; i++)
        {
            if (!(_matrix[i, i] > 0))
                return null;
            _scale[i] = 1 / Math.Sqrt(_matrix[i, i]);
        }
        for (int i = 0; i < _size; i++)
        {
            for (int j = 0; j <= i; j++)
            {
                double sum = i == j ? 1 + damping : _matrix[i, j] * _scale[i] * _scale[j];
                for (int k = 0; k < j; k++)
                    sum -= factor[i, k] * factor[j, k];
                // 1e-12: the scaled columns are dependent to the rounding of their products.
                if (i == j && !(sum > 1e-12))
                    return null;
                factor[i, j] = i == j ? Math.Sqrt(sum) : sum / factor[j, j];
            }
        }
        return factor;
    }

    /// <summary>The unknowns.</summary>
    public double[] Solve(double[,] factor) => Solve(factor, _right);

    /// <summary>Column of the inverse matrix: with weights of 1/variance, the covariances of one unknown with all.</summary>
    public double[] Covariances(double[,] factor, int unknown)
    {
        var unit = new double[_size];
        unit[unknown] = 1;
        return Solve(factor, unit);
    }

    private double[] Solve(double[,] factor, double[] right)
    {
        var x = new double[_size];
        for (int i = 0; i < _size; i++)
        {
            double sum = right[i] * _scale[i];
            for (int k = 0; k < i; k++)
                sum -= factor[i, k] * x[k];
            x[i] = sum / factor[i, i];
        }
        for (int i = _size - 1; i >= 0; i--)
        {
            double sum = x[i];
            for (int k = i + 1; k < _size; k++)
                sum -= factor[k, i] * x[k];
            x[i] = sum / factor[i, i];
        }
        for (int i = 0; i < _size; i++)
            x[i] *= _scale[i];
        return x;
    }
}
