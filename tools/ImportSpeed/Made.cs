using System.Globalization;
using System.IO.Compression;
using System.Text;

namespace ScopeReader.ImportSpeed;

/// <summary>Long made exports in several shapes.</summary>
internal static class Made
{
    /// <summary>The shapes, the plain one first.</summary>
    public static IReadOnlyList<string> Shapes { get; } = ["plain", "crlf", "semicolon", "tab", "spaces", "quoted", "long", "short", "channels", "index", "clock", "unitcells", "units", "utf16", "gzip"];

    /// <summary>An export in memory.</summary>
    public static byte[] Bytes(string shape, long rows)
    {
        using var bytes = new MemoryStream();
        Write(bytes, shape, rows);
        return bytes.ToArray();
    }

    /// <summary>Writes an export.</summary>
    public static void Write(Stream to, string shape, long rows)
    {
        using Stream stream = shape == "gzip" ? new GZipStream(to, CompressionLevel.Fastest, leaveOpen: true) : to;
        using var writer = new StreamWriter(stream, shape == "utf16" ? Encoding.Unicode : new UTF8Encoding(false), 1 << 20, leaveOpen: true);
        var random = new Random(1);
        for (long i = 0; i < rows; i++)
        {
            // A quantised sine with noise; times of ten digits, as in -4.999998000e-03,1.234e-01.
            double t = -5e-3 + i * 2e-9, v = Math.Round(250 * (Math.Sin(i * 0.01) + 0.02 * random.NextDouble())) / 1000;
            string time = E(t, "e9"), value = E(v, "e3");
            writer.Write(shape switch
            {
                "crlf" => $"{time},{value}\r\n",
                "semicolon" => $"{time.Replace('.', ',')};{value.Replace('.', ',')}\n",
                "tab" => $"{time}\t{value}\n",
                "spaces" => $"{time}   {value}\n",
                "quoted" => $"\"{time}\",\"{value}\"\n",
                "long" => $"{t.ToString("E16", CultureInfo.InvariantCulture)},{v.ToString("E16", CultureInfo.InvariantCulture)}\n",
                "short" => string.Create(CultureInfo.InvariantCulture, $"{t:R},{v:R}\n"),
                "channels" => $"{time},{value},{value},{value},{value}\n",
                "index" => string.Create(CultureInfo.InvariantCulture, $"{i},{value},{value},\n"),
                "clock" => string.Create(CultureInfo.InvariantCulture, $"{i / 3_600_000_000 % 24:00}:{i / 60_000_000 % 60:00}:{i / 1e6 % 60:00.000000},{value}\n"),
                "unitcells" => $"{time},s,{value}, V,\n",
                "units" => $"{time}s,{value}V\n",
                _ => $"{time},{value}\n",
            });
        }
    }

    // Exponents of two digits, as most instruments print them.
    private static string E(double value, string format)
    {
        string text = value.ToString(format, CultureInfo.InvariantCulture);
        int at = text.IndexOf('e');
        return text[..(at + 2)] + text[(at + 3)..];
    }
}
