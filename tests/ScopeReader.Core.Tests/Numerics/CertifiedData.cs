using System.Globalization;

namespace ScopeReader.Tests.Numerics;

/// <summary>NIST StRD data sets, from Published/ or by their rule, and how closely a result meets a certified value.</summary>
internal static class CertifiedData
{
    /// <summary>The numbers of a file: one array a column.</summary>
    public static double[][] Columns(string file)
    {
        using var reader = new StreamReader(typeof(CertifiedData).Assembly.GetManifestResourceStream(file)!);
        double[][] rows = [.. reader.ReadToEnd().Split('\n', StringSplitOptions.RemoveEmptyEntries)
            .Where(line => line[0] is not '#' && !char.IsAsciiLetter(line[0]))
            .Select(line => line.Split(',').Select(cell => double.Parse(cell, CultureInfo.InvariantCulture)).ToArray())];
        return [.. Enumerable.Range(0, rows[0].Length).Select(column => rows.Select(row => row[column]).ToArray())];
    }

    /// <summary>NumAcc4 by its rule: 10000000.2, then 500 pairs of 0.1 below and 0.1 above.</summary>
    public static double[] NumAcc4() => [10000000.2, .. Enumerable.Range(0, 500).SelectMany(_ => (double[])[10000000.1, 10000000.3])];

    /// <summary>NoInt1 by its rule: x = 60 … 70, y = 130 … 140.</summary>
    public static (double[] X, double[] Y) NoInt1() => ([.. Enumerable.Range(60, 11).Select(i => (double)i)], [.. Enumerable.Range(130, 11).Select(i => (double)i)]);

    /// <summary>Digits that agree: the negative decimal logarithm of the relative difference, 15 at most.</summary>
    public static double Digits(double certified, double found) =>
        certified == found ? 15 : Math.Min(15, -Math.Log10(Math.Abs(found - certified) / Math.Abs(certified)));
}
