using System.Globalization;
using System.IO.Compression;
using System.Text;

namespace ScopeReader.ImportFuzz;

/// <summary>Made exports that mutation starts from: one of each build that is met on the bench, all invented.</summary>
public static class Exports
{
    /// <summary>The exports, as bytes.</summary>
    public static IReadOnlyList<byte[]> All { get; } = Make();

    private static List<byte[]> Make()
    {
        string[] texts =
        [
            "Time (s),In 1 (V),In 2 (mV)\n" + Rows(60, i => $"{N(1e-6 * i)},{N(Math.Sin(i * 0.3))},{i % 7}"),
            Rows(40, i => (i == 0 ? "Points,40,," : i == 1 ? "Step,2.0e-6,," : ",,,") + $"{N(2e-6 * i)},{N(0.125 * i)},"),
            "t,2,4\nsecond,Volt,Ampere\n" + Rows(60, i => $"{(-20e-6 + 0.03e-6 * i).ToString("0.00E+00", CultureInfo.InvariantCulture)},{i},-3.1E-03"),
            "N,A,B,T0,Step,\nCount,Volt,Volt,-2.0e-4,5.0e-7\n" + Rows(40, i => $"{i},{N(0.12 * i)},3.30,"),
            "Time,Input 1\n(us),(mV)\n\n" + Rows(40, i => $"{N(0.05 * i)},{N(12.5 * i)}"),
            "sep=;\nStart;1000,0;Hz;\nStop;2000,0;Hz;\nUnit;dBm;\n" + Rows(40, i => $"{Comma(-80.5 + i)};"),
            "RBW,3kHz\n" + Rows(40, i => $"{i},{N(350 + 50.5 * i)}Hz,{N(-41.2 + i)}dBm"),
            "#Rate: 50000Hz\n#Points: 20\n#Input 1 (V)\n" + Rows(40, i => N(0.25 * i)),
            "2031-05-06T14:03:59.5,1.5\n2031-05-06T14:04:00.0,\"1.25\"\n2031-05-06T14:04:00.5,OL\n2031-05-06T14:04:01.0,9.91E37\n",
            "Separator\tTab\nDecimal sign\t,\n---end---\nX\tIn0\tNote\n" + Rows(40, i => $"{Comma(0.001 * i)}\t{Comma(0.031 * i)}\tnote {i}"),
            string.Concat(Enumerable.Range(1, 4).Select(e => "Event\n15\nt\tv\n" + Rows(15, i => $"{N(0.002 * i)}\t{N(e + 0.1 * i)}"))),
            "A t,A v,B t,B v\n" + Rows(40, i => $"{N(1e-3 * i)},{i},{N(1e-3 * i + 5e-4)},{(i < 30 ? N(-i) : "")}"),
            "F,,L,,\n" + Rows(40, i => $"  {N(990 + i)},kHz,{N(-41.5 + i)}, dBm,"),
            "f[Hz]\tU\tRemark\r" + Rows(40, i => $"{Comma(120.5 + i)}\t{Comma(0.031 * (i + 1))}"),
            Rows(60, i => $"{N(-1.2e-6 + 1e-7 * i)}   {N(Math.Cos(i))}"),
        ];
        List<byte[]> all = [.. texts.Select(Encoding.UTF8.GetBytes)];
        all.Add([.. Encoding.Unicode.GetPreamble(), .. Encoding.Unicode.GetBytes(texts[0])]);
        all.Add(Encoding.Latin1.GetBytes(texts[4].Replace("us", "µs", StringComparison.Ordinal)));
        all.Add(Packed(Encoding.UTF8.GetBytes(texts[2])));
        return all;
    }

    private static byte[] Packed(byte[] bytes)
    {
        using var packed = new MemoryStream();
        using (var gzip = new GZipStream(packed, CompressionLevel.Fastest))
            gzip.Write(bytes);
        return packed.ToArray();
    }

    private static string Rows(int count, Func<int, string> row) => string.Concat(Enumerable.Range(0, count).Select(i => row(i) + "\n"));

    private static string N(double value) => value.ToString("G7", CultureInfo.InvariantCulture);

    private static string Comma(double value) => value.ToString("0.000", CultureInfo.InvariantCulture).Replace('.', ',');
}
