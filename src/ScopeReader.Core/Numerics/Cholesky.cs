namespace ScopeReader.Numerics;

/// <summary>Solves the normal equations of a least-squares fit, columns scaled to the same length.</summary>
public sealed class Cholesky
{
    // A column whose part that no other explains is below this share of its square counts as a copy of the others.
    private const double Smallest = 1e-9;

    private readonly double[,] _factor;
    private readonly double[] _scale;

    private Cholesky(double[,] factor, double[] scale) => (_factor, _scale) = (factor, scale);

    /// <summary>Factors a symmetric matrix.</summary>
    /// <param name="matrix">Shape [n, n]; its lower half is read.</param>
    /// <returns>The factors, or null where two columns collide: the matrix is singular to working accuracy.</returns>
    public static Cholesky? Factor(double[,] matrix)
    {
        ArgumentNullException.ThrowIfNull(matrix);
        int n = matrix.GetLength(0);
        var scale = new double[n];
        for (int i = 0; i < n; i++)
        {
            if (!(matrix[i, i] > 0))
                return null;
            scale[i] = 1 / Math.Sqrt(matrix[i, i]);
        }
        var l = new double[n, n];
        for (int j = 0; j < n; j++)
            for (int i = j; i < n; i++)
            {
                double sum = matrix[i, j] * scale[i] * scale[j];
                for (int k = 0; k < j; k++)
                    sum -= l[i, k] * l[j, k];
                if (i > j)
                    l[i, j] = sum / l[j, j];
                else if (sum > Smallest)
                    l[j, j] = Math.Sqrt(sum);
                else
                    return null;
            }
        return new Cholesky(l, scale);
    }

    /// <summary>Solves the system.</summary>
    /// <param name="right">Shape [n].</param>
    public double[] Solve(ReadOnlySpan<double> right)
    {
        int n = _scale.Length;
        var x = new double[n];
        for (int i = 0; i < n; i++)
        {
            double sum = right[i] * _scale[i];
            for (int k = 0; k < i; k++)
                sum -= _factor[i, k] * x[k];
            x[i] = sum / _factor[i, i];
        }
        for (int i = n - 1; i >= 0; i--)
        {
            double sum = x[i];
            for (int k = i + 1; k < n; k++)
                sum -= _factor[k, i] * x[k];
            x[i] = sum / _factor[i, i];
        }
        for (int i = 0; i < n; i++)
            x[i] *= _scale[i];
        return x;
    }

    /// <summary>A diagonal element of the inverse: the variance of an unknown for noise of variance 1.</summary>
    /// <param name="index">0 to n - 1.</param>
    public double InverseDiagonal(int index)
    {
        var unit = new double[_scale.Length];
        unit[index] = 1;
        return Solve(unit)[index];
    }
}
