using ScopeReader.Readings;

namespace ScopeReader.Tests.Readings;

public class DecibelsTests
{
    // Tolerances: the rows' own, a few roundings of a double.
    private const double Rounding = 1e-9;

    [Fact]
    public void One_volt_in_fifty_ohms_is_13_dBm() => // E50, closed form
        Assert.Equal(13.0102999566398, Decibels.DbmOfVolts(1, 50), Rounding);

    [Fact]
    public void Zero_dBm_in_fifty_ohms_is_224_millivolts() => // E51, closed form
        Assert.Equal(0.223606797749979, Decibels.VoltsOfDbm(0, 50), 1e-12);

    [Theory]
    [InlineData(50, 106.98970004336)] // E52, closed form
    [InlineData(75, 108.750612633917)] // E53
    public void Microvolts_of_a_milliwatt_depend_on_the_impedance(double ohms, double expected) =>
        Assert.Equal(expected, Decibels.DbuvOfDbm(0, ohms), Rounding);

    [Fact]
    public void Sine_of_one_volt_peak_to_peak_is_4_dBm() => // E54, closed form; rms is a 2√2th of peak to peak
        Assert.Equal(3.97940008672038, Decibels.DbmOfVolts(1 / (2 * Math.Sqrt(2)), 50), Rounding);

    [Fact]
    public void Milliwatts_and_volts_are_13_dB_apart_in_fifty_ohms() => // E55, closed form
        Assert.Equal(13.0102999566398, Decibels.DbmOfDbv(0, 50), Rounding);

    [Fact]
    public void Wrong_impedance_costs_1_76_dB() => // E77, closed form: the same voltage read as if in 50 instead of 75 ohm
        Assert.Equal(1.76091259055681, Decibels.DbmOfVolts(1, 50) - Decibels.DbmOfVolts(1, 75), Rounding);

    [Fact]
    public void Line_read_3_dB_above_noise_is_3_dB_lower_alone() => // E64, closed form
        Assert.Equal(-3.020624399283, Decibels.WithoutNoise(0, -3), Rounding);

    [Fact]
    public void Microvolts_are_120_dB_below_volts() => Assert.Equal(-40, Decibels.DbvOfDbuv(80), Rounding);

    [Fact]
    public void Watts_are_thousands_of_milliwatts() => Assert.Equal(30, Decibels.DbmOfWatts(1), Rounding);
}
