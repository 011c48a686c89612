using ScopeReader.Numerics;

namespace ScopeReader.Tests.Numerics;

public class WindowTests
{
    public static TheoryData<string, double, double> NoiseBandwidths => new()
    {
        { "Hann", 1.5, 1e-9 }, // E18, closed form
        { "Blackman-Harris", 2.0044, 1e-4 }, // E28, Heinzel et al. 2002
        { "HFT90D", 3.8832, 1e-4 }, // E35, Heinzel et al. 2002 (from memory)
    };

    public static TheoryData<string, double, double> HighestSidelobes => new()
    {
        { "Hann", -31.47, 0.01 }, // E21, Harris 1978
        { "Blackman-Harris", -92, 0.05 }, // E31, Heinzel et al. 2002
        { "HFT90D", -90.2, 0.05 }, // E36, Heinzel et al. 2002
    };

    // Tolerances in both tables: half a step of the last digit printed, as checks of the same rows have it.
    [Theory]
    [MemberData(nameof(NoiseBandwidths))]
    public void Noise_bandwidth_is_the_published_one_by_coefficients_and_by_values(string name, double expected, double tolerance)
    {
        Window window = Named(name);
        double[] values = window.Values(2048);
        Assert.Equal(expected, window.NoiseBandwidth, tolerance);
        Assert.Equal(expected, values.Length * values.Sum(v => v * v) / Math.Pow(values.Sum(), 2), tolerance);
    }

    [Theory]
    [MemberData(nameof(HighestSidelobes))]
    public void Highest_sidelobe_is_the_published_one(string name, double expected, double tolerance)
    {
        Window window = Named(name);
        // Beyond the main lobe, whose first zero is at the number of terms.
        double first = name switch { "Hann" => 2, "Blackman-Harris" => 4, _ => 5 }, highest = 0;
        for (double d = first; d < 40; d += 0.001)
            highest = Math.Max(highest, Math.Abs(window.Response(d)));
        Assert.Equal(expected, 20 * Math.Log10(highest), tolerance);
    }

    [Theory]
    [InlineData("Hann", 1.4236)] // E19, Heinzel et al. 2002
    [InlineData("Blackman-Harris", 0.8256)] // E29
    public void Scalloping_loss_is_the_published_one(string name, double expected) =>
        Assert.Equal(-expected, 20 * Math.Log10(Named(name).Response(0.5)), 1e-4);

    [Fact]
    public void Flat_top_reads_an_amplitude_to_a_few_thousandths_of_a_decibel_anywhere_in_its_bin()
    {
        // E41: 0.0039 dB, Heinzel et al. 2002 (from memory); half of the last digit.
        double worst = 0;
        for (double d = 0; d <= 0.5; d += 0.001)
            worst = Math.Max(worst, Math.Abs(20 * Math.Log10(Window.FlatTop.Response(d))));
        Assert.Equal(0.0039, worst, 1e-4);
    }

    [Theory]
    [InlineData("Hann", 1.4382)] // E20
    [InlineData("Blackman-Harris", 1.8962)] // E30
    public void Three_decibel_width_is_the_published_one(string name, double expected)
    {
        Window window = Named(name);
        double low = 0, high = 2;
        for (int i = 0; i < 50; i++)
            (low, high) = 20 * Math.Log10(window.Response((low + high) / 2)) > -3 ? ((low + high) / 2, high) : (low, (low + high) / 2);
        Assert.Equal(expected, 2 * low, 1e-4);
    }

    [Fact]
    public void Coherent_gain_is_the_mean_of_the_values()
    {
        Assert.Equal(0.35875, Window.BlackmanHarris.CoherentGain, 1e-12); // E32, Harris 1978
        // The cosines add up to nothing over whole cycles; 2048 roundings of 1.1e-16.
        Assert.Equal(0.35875, Window.BlackmanHarris.Values(2048).Average(), 1e-13);
    }

    // Harris 1978 and Heinzel et al. 2002; where the rows say so from memory. Zero where a table has no such figure; tolerances are the rows'.
    public static TheoryData<string, double[], double[], double[], double[]> Published => new()
    {
        { "rectangular", [1], [0, 0], [3.9224, 1e-4], [-13.26, 0.01] }, // E38, E39
        { "Hamming", [0.54, 0.46], [1.3628, 1e-4], [1.7514, 1e-4], [-42.7, 0.05] }, // E22 to E24
        { "Blackman", [0.42, 0.5, 0.08], [1.73, 0.005], [1.1, 0.005], [-58, 0.5] }, // E25 to E27, Harris 1978
        { "HFT95", [1, 1.9383379, 1.3045202, 0.4028270, 0.0350665], [3.8112, 1e-4], [0, 0], [-95, 0.05] }, // E33, E34
        { "HFT116D", [1, 1.9575375, 1.4780705, 0.6367431, 0.1228389, 0.0066288], [4.2186, 1e-4], [0, 0], [0, 0] }, // E37
    };

    [Theory]
    [MemberData(nameof(Published))]
    public void Published_tables_come_out_of_the_published_coefficients(string name, double[] coefficients, double[] noiseBandwidth, double[] scalloping, double[] sidelobe)
    {
        Window window = Window.OfCosines(name, coefficients);
        if (noiseBandwidth[1] > 0)
            Assert.Equal(noiseBandwidth[0], window.NoiseBandwidth, noiseBandwidth[1]);
        if (scalloping[1] > 0)
            Assert.Equal(-scalloping[0], 20 * Math.Log10(window.Response(0.5)), scalloping[1]);
        double highest = 0;
        for (double d = coefficients.Length; d < 40; d += 0.001)
            highest = Math.Max(highest, Math.Abs(window.Response(d)));
        if (sidelobe[1] > 0)
            Assert.Equal(sidelobe[0], 20 * Math.Log10(highest), sidelobe[1]);
    }

    [Fact]
    public void HFT95_reads_an_amplitude_within_what_is_published()
    {
        // E40: 0.0044 dB, Heinzel et al. 2002 (from memory).
        var window = Window.OfCosines("HFT95", 1, 1.9383379, 1.3045202, 0.4028270, 0.0350665);
        double worst = 0;
        for (double d = 0; d <= 0.5; d += 0.001)
            worst = Math.Max(worst, Math.Abs(20 * Math.Log10(window.Response(d))));
        Assert.Equal(0.0044, worst, 1e-4);
    }

    private static Window Named(string name) => new[] { Window.Hann, Window.BlackmanHarris, Window.FlatTop }.Single(w => w.Name == name);
}
