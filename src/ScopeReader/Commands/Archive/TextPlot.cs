using System.Globalization;
using System.Text;
using ScopeReader.Readings;

namespace ScopeReader.Commands.Archive;

/// <summary>Points over an axis, drawn with characters.</summary>
internal static class TextPlot
{
    private const int Height = 12, Margin = 14;

    /// <summary>Draws points; those at the indices of <paramref name="outside"/> as an O, all others as an asterisk.</summary>
    public static IEnumerable<string> Lines(IReadOnlyList<double> x, IReadOnlyList<double> y, string unit, IReadOnlyList<double> rules, IReadOnlyList<int> outside, int width)
    {
        double left = x.Min(), right = x.Max(), low = y.Concat(rules).Min(), high = y.Concat(rules).Max();
        (double across, double up) = (right > left ? right - left : 1, high > low ? high - low : 1);
        int columns = Math.Max(20, width - Margin - 1);
        var cells = new char[Height, columns];
        int Row(double value) => Height - 1 - (int)Math.Round((value - low) / up * (Height - 1));
        for (int r = 0; r < Height; r++)
            for (int c = 0; c < columns; c++)
                cells[r, c] = ' ';
        foreach (double rule in rules)
            for (int c = 0; c < columns; c += 2)
                cells[Row(rule), c] = '-';
        for (int i = 0; i < x.Count; i++)
            cells[Row(y[i]), (int)Math.Round((x[i] - left) / across * (columns - 1))] = outside.Contains(i) ? 'O' : '*';
        for (int r = 0; r < Height; r++)
        {
            var line = new StringBuilder();
            string label = r is 0 or Height - 1 || r == Height / 2 ? Engineering.Format(high - up * r / (Height - 1), unit, 4) : "";
            line.Append(CultureInfo.InvariantCulture, $"{label,Margin - 1} |");
            for (int c = 0; c < columns; c++)
                line.Append(cells[r, c]);
            yield return line.ToString().TrimEnd();
        }
    }
}
