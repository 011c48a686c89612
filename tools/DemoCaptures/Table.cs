using System.Globalization;
using System.Text;

namespace ScopeReader.DemoCaptures;

/// <summary>Columns of numbers as lines of text.</summary>
internal static class Table
{
    /// <summary>A comma file: one header row, times with eight digits, values with so many decimals.</summary>
    public static byte[] Timed(string header, decimal start, decimal interval, int decimals, params double[][] channels)
    {
        var text = new StringBuilder(header).Append('\n');
        for (int i = 0; i < channels[0].Length; i++)
        {
            text.Append((start + i * interval).ToString("0.0000000E+00", CultureInfo.InvariantCulture));
            foreach (double[] channel in channels)
                text.Append(',').Append(Fixed(channel[i], decimals));
            text.Append('\n');
        }
        return Encoding.UTF8.GetBytes(text.ToString());
    }

    /// <summary>A value with a fixed number of decimals, and no minus before a zero.</summary>
    public static string Fixed(double value, int decimals)
    {
        string text = value.ToString("F" + decimals.ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);
        return text.StartsWith('-') && text.AsSpan(1).IndexOfAnyExcept('0', '.') < 0 ? text[1..] : text;
    }
}
