using ScopeReader.Harmonics;

namespace ScopeReader.Tests.Harmonics;

public class ResolutionFilterTests
{
    // Tolerances are the rows' own.
    [Fact]
    public void Gaussian_filter_has_its_noise_bandwidth_and_shape()
    {
        Assert.Equal(1.06446701943123, ResolutionFilter.GaussianNoiseBandwidth, 1e-8); // E56, closed form
        Assert.Equal(0.752691847789252, ResolutionFilter.GaussianNoiseBandwidth / ResolutionFilter.GaussianWidth(6.0206), 2e-4); // E57
        Assert.Equal(4.46447853274312, ResolutionFilter.GaussianWidth(60), 1e-9); // E75
    }

    [Fact]
    public void Synchronously_tuned_poles_have_theirs()
    {
        Assert.Equal(1.12849896954763, ResolutionFilter.SynchronousNoiseBandwidth(4), 1e-7); // E58, closed form
        Assert.Equal(1.11384528218704, ResolutionFilter.SynchronousNoiseBandwidth(5), 1e-7); // E59
        Assert.Equal(12.7219460989312, ResolutionFilter.SynchronousWidth(4, 60), 1e-9); // E76
    }

    [Fact]
    public void Averages_of_noise_read_low_by_what_is_averaged()
    {
        Assert.Equal(2.50681578134852, NoiseAveraging.OfLevels, 1e-9); // E60, closed form
        Assert.Equal(1.04910118633829, NoiseAveraging.OfVoltages, 1e-9); // E61
    }

    [Fact]
    public void Flat_trace_has_its_density_times_the_channel() => // E62: -80 dBm through 10 kHz, 1000 points of 1 kHz
        Assert.Equal(-60.2713221016052, ChannelPower.Decibel(Enumerable.Repeat(-80.0, 1000).ToArray(), 1e3, 10e3 * ResolutionFilter.GaussianNoiseBandwidth), 1e-6);

    [Fact]
    public void Gaussian_band_holds_99_percent_in_five_standard_deviations()
    {
        // E63. A point spreads its power over its spacing: that adds 1/12 of 0.01² to a variance of 1, 4e-6 of the width.
        double[] powers = [.. Enumerable.Range(-1000, 2001).Select(i => Math.Exp(-i * i * 1e-4 / 2))];
        OccupiedBand band = OccupiedBand.Of(-10, 0.01, powers)!.Value;
        Assert.Equal(5.1516586070978, band.Width, 1e-4);
        Assert.Equal(0, band.Low + band.High, 1e-9);
    }
}
