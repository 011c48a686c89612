using System.Globalization;
using System.IO.Compression;
using System.Text;

namespace ScopeReader.ImportSpeed;

/// <summary>Long made exports in several shapes.</summary>
internal static class Made
{
    public static void Write(string file, string shape, long rows)
    {
        using Stream stream = shape == "gzip" ? new GZipStream(File.Create(file), CompressionLevel.Fastest) : File.Create(file);
        using var writer = new StreamWriter(stream, shape == "utf16" ? Encoding.Unicode : new UTF8Encoding(false), 1 << 20);
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
                "long" => $"{t.ToString("E16", CultureInfo.InvariantCulture)},{v.ToString("E16", CultureInfo.InvariantCulture)}\n",
                "channels" => $"{time},{value},{value},{value},{value}\n",
                "units" => $"{time}s,{value}V\n",
                _ => $"{time},{value}\n",
            });
        }
    }

    /// <summary>The most memory that this process has held, from the system's own count.</summary>
    public static double PeakMegabytes()
    {
        foreach (string line in File.ReadLines("/proc/self/status"))
            if (line.StartsWith("VmHWM:", StringComparison.Ordinal))
                return double.Parse(line.AsSpan(6, line.Length - 6 - 3), CultureInfo.InvariantCulture) / 1024;
        return 0;
    }

    // Exponents of two digits, as most instruments print them.
    private static string E(double value, string format)
    {
        string text = value.ToString(format, CultureInfo.InvariantCulture);
        int at = text.IndexOf('e');
        return text[..(at + 2)] + text[(at + 3)..];
    }
}
