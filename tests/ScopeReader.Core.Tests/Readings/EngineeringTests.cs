using ScopeReader.Readings;

namespace ScopeReader.Tests.Readings;

public class EngineeringTests
{
    // Two digits of uncertainty and the value to match: JCGM 100:2008, 7.2.6.
    [Theory]
    [InlineData(38.2e6, 0.4e6, "Hz", "38.20 MHz ± 0.40 MHz")]
    [InlineData(455012.31, 10.8, "Hz", "455.012 kHz ± 0.011 kHz")]
    [InlineData(27.05, 23.8, "ppm", "27 ppm ± 24 ppm")]
    [InlineData(1.23456e-9, 9.96e-12, "s", "1.235 ns ± 0.010 ns")]
    [InlineData(0.0004, 0.02, "V", "0 mV ± 20 mV")]
    [InlineData(-0.00049, 0.0201, "V", "0 mV ± 20 mV")]
    [InlineData(3.3, 0.0123, "V", "3.300 V ± 0.012 V")]
    [InlineData(1234567, 123456, "Hz", "1.23 MHz ± 0.12 MHz")]
    [InlineData(12345, 1234, "ppm", "12300 ppm ± 1200 ppm")]
    [InlineData(-9.5424, 0.0123, "dBc", "-9.542 dBc ± 0.012 dBc")]
    [InlineData(0.1042, 0.00057, "1", "0.10420 ± 0.00057")]
    [InlineData(999.9996e3, 0.5, "Hz", "999.99960 kHz ± 0.00050 kHz")]
    [InlineData(1.25e57, 3e55, "V", "1.250e57 V ± 3.0e55 V")]
    [InlineData(3.1e-18, 2e-20, "1", "3.100e-18 ± 2.0e-20")]
    public void Uncertainty_has_two_digits_and_the_value_matches(double value, double uncertainty, string unit, string expected) =>
        Assert.Equal(expected, Engineering.Format(value, uncertainty, unit));

    [Theory]
    [InlineData(8e-9, "s", 4, "8.000 ns")]
    [InlineData(999.96, "V", 4, "1.000 kV")]
    [InlineData(0, "V", 4, "0 V")]
    [InlineData(-0.0151, "V", 2, "-15 mV")]
    [InlineData(5, "1", 2, "5.0")]
    [InlineData(1e57, "V", 4, "1.000e57 V")]
    [InlineData(-2.5e-40, "A", 2, "-2.5e-40 A")]
    [InlineData(6.02e23, "", 3, "6.02e23")]
    [InlineData(4.5e-13, "1", 2, "4.5e-13")]
    public void A_value_alone_has_the_digits_asked_for(double value, string unit, int digits, string expected) =>
        Assert.Equal(expected, Engineering.Format(value, unit, digits));

    [Theory]
    [InlineData(455e3, "Hz", "455 kHz")]
    [InlineData(503.5e3, "Hz", "503.5 kHz")]
    [InlineData(0, "V", "0 V")]
    [InlineData(-50, "ppm", "-50 ppm")]
    [InlineData(1e-8, "s", "10 ns")]
    [InlineData(1e50, "V", "1e50 V")]
    public void A_given_value_has_no_idle_zeros(double value, string unit, string expected) =>
        Assert.Equal(expected, Engineering.Given(value, unit));
}
