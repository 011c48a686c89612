using CsCheck;
using ScopeReader.Readings;

namespace ScopeReader.Tests.Readings;

public class UnitsTests
{
    // SI prefixes and decimal powers: BIPM SI brochure, table 7. Exact but for the rounding of one multiplication.
    [Theory]
    [InlineData("455kHz", "Hz", 455e3)]
    [InlineData("1.2 us", "s", 1.2e-6)]
    [InlineData("1.2 µs", "s", 1.2e-6)]
    [InlineData("1.2 μs", "s", 1.2e-6)]
    [InlineData("-50 ppm", "ppm", -50)]
    [InlineData("15pF", "F", 15e-12)]
    [InlineData("50ohm", "ohm", 50)]
    [InlineData("50 Ω", "ohm", 50)]
    [InlineData("1e3 Hz", "Hz", 1000)]
    [InlineData("+3.3V", "V", 3.3)]
    [InlineData("150 mm", "m", 0.15)]
    [InlineData("5m", "m", 5)]
    [InlineData("-20 dBc", "dBc", -20)]
    [InlineData("60 dBuV", "dBµV", 60)]
    [InlineData("0.5", "1", 0.5)]
    [InlineData("0.01 %", "ppm", 100)]
    [InlineData("500 ppm", "%", 0.05)]
    [InlineData("20 ppb", "ppm", 0.02)]
    public void Values_are_read_with_their_units(string text, string unit, double expected)
    {
        Assert.True(Units.TryParse(text, unit, out double value, out _));
        Assert.Equal(expected, value, Math.Abs(expected) * 4e-16);
    }

    [Theory]
    [InlineData("fast", "Hz", "expected a number with its unit, such as 455 kHz, found \"fast\"")]
    [InlineData("455", "Hz", "expected a unit after the number, such as 455 kHz, found \"455\"")]
    [InlineData("25 ppm", "Hz", "expected a value in Hz, such as 455 kHz, found \"25 ppm\"")]
    [InlineData("25 kppm", "ppm", "expected a number with its unit, such as 25 ppm, found \"25 kppm\"")]
    [InlineData("1e999 V", "V", "expected a number with its unit, such as 3.3 V, found \"1e999 V\"")]
    [InlineData("1,2 us", "s", "expected a number with its unit, such as 1.2 us, found \"1,2 us\"")]
    public void What_cannot_be_read_is_said(string text, string unit, string expected)
    {
        Assert.False(Units.TryParse(text, unit, out _, out string problem));
        Assert.Equal(expected, problem);
    }

    [Fact]
    public void What_is_written_is_read_again() =>
        Gen.Select(Gen.Double[-12, 12], Gen.Bool).Sample((exponent, negative) =>
        {
            double value = (negative ? -1 : 1) * Math.Pow(10, exponent);
            string text = Engineering.Format(value, "Hz", 15);
            // Law: writing and reading are inverse, to the fifteen digits written.
            return Units.TryParse(text, "Hz", out double again, out _) && Math.Abs(again - value) <= 1e-14 * Math.Abs(value);
        });
}
