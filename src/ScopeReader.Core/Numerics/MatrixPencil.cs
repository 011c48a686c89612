using System.Numerics;
using MathNet.Numerics.LinearAlgebra;

namespace ScopeReader.Numerics;

/// <summary>Damped sinusoids in evenly spaced values, without a start: the matrix pencil.</summary>
/// <remarks>
/// Hua and Sarkar 1990 (from memory): the Hankel matrix of the values has, without noise, as many singular values as there are poles;
/// its leading right singular vectors, less their last and less their first row, differ by the poles. Least squares then, which noise
/// biases little; a fit from there reaches the bound. The cost grows with the cube of the number of values.
/// </remarks>
public static class MatrixPencil
{
    /// <summary>Values that are worth their cost.</summary>
    public const int MostValues = 60;

    /// <summary>The poles z of values that go as Σ a z^n.</summary>
    /// <param name="values">Shape [n], evenly spaced, n of 6 to 60.</param>
    /// <param name="poles">How many: two for each damped sinusoid, one for a level; at most a third of the values.</param>
    public static Complex[] Poles(ReadOnlySpan<double> values, int poles)
    {
        ArgumentOutOfRangeException.ThrowIfGreaterThan(values.Length, MostValues, nameof(values));
        ArgumentOutOfRangeException.ThrowIfGreaterThan(poles, values.Length / 3);
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(poles);
        int columns = 2 * values.Length / 5 + 1, rows = values.Length - columns + 1;
        var hankel = Matrix<double>.Build.Dense(rows, columns);
        for (int i = 0; i < rows; i++)
            for (int j = 0; j < columns; j++)
                hankel[i, j] = values[i + j];
        Matrix<double> leading = hankel.Svd().VT.SubMatrix(0, poles, 0, columns).Transpose();
        Matrix<double> first = leading.SubMatrix(0, columns - 1, 0, poles), second = leading.SubMatrix(1, columns - 1, 0, poles);
        return [.. first.TransposeThisAndMultiply(first).Solve(first.TransposeThisAndMultiply(second)).Evd().EigenValues];
    }
}
