using System.Text;

namespace ScopeReader.ImportFuzz;

/// <summary>Spoils an export in ways that files get spoilt, and in some that they don't.</summary>
public static class Mutation
{
    private const int LargestBytes = 1 << 20;

    private static readonly string[] s_pieces =
    [
        ",", ";", "\t", "\n", "\r", "\r\n", "\"", "\"\"", "#", "=", ":", " ", "-", "+", ".", "e", "E+999", "e-99999", "9.9E37", "-9.91E37", "inf", "NaN", "OL", "\0", "\u001A", "\uFEFF", "µ", "∞",
        "1,234", "1.234,5", "1 234,5", "0x1F", "12:00:00", "2031-05-06", "Time", "Hz", "s", "V", "(", "[mV]", "Step,1e-9\n", "Points,800\n", "Event\n", "\n\n\n", "1e308", "5e-324", "00000000", "99999999999999999999999",
    ];

    /// <summary>A spoilt copy, the same for the same random numbers.</summary>
    public static byte[] Of(byte[] export, Random random)
    {
        var bytes = new List<byte>(export);
        int steps = 1 + random.Next(4);
        for (int i = 0; i < steps && bytes.Count > 0; i++)
            Step(bytes, random);
        return bytes.Count > LargestBytes ? [.. bytes.Take(LargestBytes)] : [.. bytes];
    }

    private static void Step(List<byte> bytes, Random random)
    {
        int at = random.Next(bytes.Count), length = Math.Min(bytes.Count - at, 1 + random.Next(random.Next(10) == 0 ? 2000 : 20));
        switch (random.Next(10))
        {
            case 0:
                bytes[at] = (byte)random.Next(256);
                break;
            case 1:
                bytes.RemoveRange(at, length);
                break;
            case 2:
                bytes.InsertRange(at, bytes.GetRange(random.Next(bytes.Count - length + 1), length));
                break;
            case 3:
                bytes.RemoveRange(at, bytes.Count - at);
                break;
            case 4:
                Replace(bytes, random);
                break;
            case 5:
                byte[] block = [.. bytes.GetRange(at, length)];
                for (int copies = 1 << random.Next(9); copies > 0 && bytes.Count < LargestBytes; copies--)
                    bytes.InsertRange(at, block);
                break;
            case 6:
                (byte from, byte to) = (bytes[at], bytes[random.Next(bytes.Count)]);
                for (int i = 0; i < bytes.Count; i++)
                    if (bytes[i] == from)
                        bytes[i] = to;
                break;
            case 7:
                byte[] other = Exports.All[random.Next(Exports.All.Count)];
                bytes.InsertRange(at, other);
                break;
            case 8:
                string piece = s_pieces[random.Next(s_pieces.Length)];
                byte[] many = Encoding.UTF8.GetBytes(string.Concat(Enumerable.Repeat(piece, 1 << random.Next(13))));
                bytes.InsertRange(at, many);
                break;
            default:
                bytes.InsertRange(at, Encoding.UTF8.GetBytes(s_pieces[random.Next(s_pieces.Length)]));
                break;
        }
    }

    // One kind of byte for another throughout: a wrong delimiter, a wrong line end, a wrong decimal mark.
    private static void Replace(List<byte> bytes, Random random)
    {
        ReadOnlySpan<byte> usual = ",;\t\n\r. \"eE-+"u8;
        (byte from, byte to) = (usual[random.Next(usual.Length)], usual[random.Next(usual.Length)]);
        for (int i = 0; i < bytes.Count; i++)
            if (bytes[i] == from)
                bytes[i] = to;
    }
}
