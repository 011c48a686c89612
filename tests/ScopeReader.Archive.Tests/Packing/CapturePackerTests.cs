using System.Globalization;
using System.Text;
using CsCheck;
using ScopeReader.Archive.Packing;
using ScopeReader.ArchiveTrials;

namespace ScopeReader.Tests.Archive.Packing;

public class CapturePackerTests
{
    [Theory]
    [InlineData("")]
    [InlineData("one line without an end")]
    [InlineData("time,CH1\n0,1\n1,2\n")]
    [InlineData("0\n0\n0\n0\n0\n0\n0\n0\n0\n0\n")]
    [InlineData("-0.0,1\n-0.0,1\n0.0,-0\n1e5,2\n1E5,2\n1e+05,03\n,\n+1,-.5\n.5,5.\n1,1\n2,2\n")]
    [InlineData("a;b\r\n1,5;2\r\n1,6;3\r\n1,7;4\r\n1,8;5\r\n1,9;6\r\n2,0;7\r\n2,1;8\r\n2,2;9\r\n2,3;1\n")]
    [InlineData("1.0, 2.0,\n1.1, 2.1,\n1.2, 2.2,\n1.3, 2.3,\n1.4, 2.4,\n1.5, 2.5,\n1.6, 2.6,\n1.7, 2.7,\n1.8, 2.8")]
    [InlineData("7350.0Hz,-41.2dBm\n7351.0Hz,-41.3dBm\n7352.0Hz,-41.4dBm\n7353.0Hz,-41.4dBm\n7354.0Hz,-41.4dBm\n7355.0Hz,-41.4dBm\n7356.0Hz,OL\n7357.0Hz,\n7358.0Hz,1\n")]
    [InlineData("999999999999999999,1\n9999999999999999999,1\n-9223372036854775808,1\n1e120,1\n1e121,1\n1e-120,1\n1,1\n1,1\n1,1\n")]
    public void The_same_bytes_come_back(string text)
    {
        byte[] bytes = Encoding.UTF8.GetBytes(text);
        Assert.Equal(bytes, CapturePacker.Unpack(CapturePacker.Pack(bytes)));
    }

    [Fact]
    public void Any_bytes_come_back() =>
        Gen.Byte.Array[0, 3000].Sample(bytes => CapturePacker.Unpack(CapturePacker.Pack(bytes)).AsSpan().SequenceEqual(bytes), iter: 300);

    [Fact]
    public void Any_table_comes_back() =>
        Gen.Select(OneOf(",", ";", "\t", " "), OneOf("\n", "\r\n"), OneOf("R", "F3", "E4", "0.000e+00", "+0.00;-0.00", "G4", "0.###", "#.00", "G17", "E16", "E18", "+0.0e0"),
                Gen.Select(Gen.Double[-5, 5], Gen.Double[-1e-6, 1e9]).Array[8, 200])
            .Sample((separator, end, format, rows) =>
            {
                string text = "x" + separator + "y" + end + string.Concat(rows.Select(r => r.Item1.ToString(format, CultureInfo.InvariantCulture) + separator
                    + r.Item2.ToString(format, CultureInfo.InvariantCulture) + end));
                byte[] bytes = Encoding.UTF8.GetBytes(text);
                return CapturePacker.Unpack(CapturePacker.Pack(bytes)).AsSpan().SequenceEqual(bytes);
            }, iter: 500);

    [Theory]
    [InlineData("0.000000000e+00", "0.000e+00")]
    [InlineData("0.000000000000e+00", "0.00")]
    [InlineData("F12", "F6")]
    [InlineData("R", "R")]
    [InlineData("G15", "G15")]
    [InlineData("G17", "G17")]
    [InlineData("E16", "E16")]
    [InlineData("E18", "E18")]
    public void A_capture_longer_than_a_block_comes_back_and_takes_a_tenth_or_less(string time, string value)
    {
        // The archive's own promise: an 8-bit capture in at most a tenth of its text. 300,000 rows make two blocks or more.
        (byte[] bytes, _) = MadeCapture.Text(3, 300_000, time, value);
        byte[] packed = CapturePacker.Pack(bytes);

        Assert.True(bytes.Length > 4 << 20);
        Assert.Equal(bytes, CapturePacker.Unpack(packed));
        Assert.InRange(packed.Length, 1, bytes.Length / 10);
    }

    [Theory]
    // As other languages write the shortest digits: a point and a zero on whole numbers, two digits of exponent.
    [InlineData("0.0\n", "1e-08\n", "2e-08\n", "1.0000000000000001e-07\n", "0.00012345678901234567\n", "-3.0\n", "-1.2345678901234567\n", "123456.78901234567\n", "1e+16\n")]
    [InlineData("0.0\r\n", "1.0E-8\r\n", "2.0E-8\r\n", "1.0000000000000001E-7\r\n", "1.2345678901234567E-4\r\n", "-3.0\r\n", "-1.2345678901234567\r\n", "1.0E7\r\n")]
    [InlineData(".5;,123456789012345678901234567890\n", "-0,1\n", "0,1\n", "-0.0\n", "1e300\n", "nan\n", "inf\n", "1,5\n")]
    public void Numbers_with_all_their_digits_come_back_as_they_were_written(params string[] rows)
    {
        byte[] bytes = Encoding.UTF8.GetBytes(string.Concat(Enumerable.Repeat(rows, 40).SelectMany(r => r)));
        Assert.Equal(bytes, CapturePacker.Unpack(CapturePacker.Pack(bytes)));
    }

    [Fact]
    public void Times_of_single_precision_that_drift_off_their_line_take_little()
    {
        // Sums of steps in single precision, written with the digits of double: each step errs by the spacing of the last sum.
        var text = new StringBuilder();
        float time = -1e-3f;
        for (int i = 0; i < 50_000; i++, time += 1e-8f)
            text.Append(CultureInfo.InvariantCulture, $"{(double)time:R},{i % 7}\n");
        byte[] bytes = Encoding.UTF8.GetBytes(text.ToString());
        byte[] packed = CapturePacker.Pack(bytes);

        Assert.Equal(bytes, CapturePacker.Unpack(packed));
        Assert.InRange(packed.Length, 1, bytes.Length / 10);
    }

    [Fact]
    public void Damaged_bytes_end_in_one_kind_of_error_or_in_other_bytes()
    {
        (byte[] bytes, _) = MadeCapture.Text(4, 300);
        byte[] packed = CapturePacker.Pack(bytes);
        for (int i = 0; i < packed.Length; i++)
        {
            byte[] damaged = [.. packed];
            damaged[i] ^= 0x55;
            try
            {
                // Where it unpacks at all the hash beside it tells.
                CapturePacker.Unpack(damaged);
            }
            catch (InvalidDataException)
            {
                // The one kind.
            }
        }
    }

    private static Gen<string> OneOf(params string[] texts) => Gen.Int[0, texts.Length - 1].Select(i => texts[i]);
}
