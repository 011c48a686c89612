using System.Buffers.Text;

namespace ScopeReader.Files.Numbers;

/// <summary>Times of day, with a date before them or without: <c>14:03:07.250</c>, <c>2031-05-06T14:03:07,25</c>.</summary>
internal static class ClockTime
{
    /// <summary>Reads one as seconds since midnight; the date is left to whoever sees midnight pass.</summary>
    /// <param name="cell">UTF-8 without spaces round it.</param>
    /// <param name="seconds">Seconds since midnight.</param>
    /// <param name="half">Half of the last printed digit, s.</param>
    public static bool TryParse(ReadOnlySpan<byte> cell, out double seconds, out double half)
    {
        (seconds, half) = (0, 0);
        int at = cell.LastIndexOfAny((byte)' ', (byte)'T');
        if (at > 0)
        {
            // What stands before the time must look like a date.
            if (cell[..at].IndexOfAnyExceptInRange((byte)'-', (byte)'9') >= 0)
                return false;
            cell = cell[(at + 1)..];
        }
        if (cell.Length > 0 && cell[^1] == 'Z')
            cell = cell[..^1];
        if (!TryField(ref cell, out int hours) || !TryField(ref cell, out int minutes) || hours > 99_999 || minutes > 59 || cell.Length == 0)
            return false;
        byte mark = cell.IndexOf((byte)',') >= 0 ? (byte)',' : (byte)'.';
        if (!char.IsAsciiDigit((char)cell[0]) || !NumberParser.TryParse(cell, mark, out double rest, out int lastDigit) || rest >= 61)
            return false;
        seconds = 3600.0 * hours + 60.0 * minutes + rest;
        half = 0.5 * Math.Pow(10, lastDigit);
        return true;
    }

    private static bool TryField(ref ReadOnlySpan<byte> text, out int value)
    {
        if (!Utf8Parser.TryParse(text, out value, out int used) || used >= text.Length || text[used] != ':' || value < 0)
            return false;
        text = text[(used + 1)..];
        return true;
    }
}
