using System.Text;
using ScopeReader.Captures;
using ScopeReader.Files;

namespace ScopeReader.Tests.Captures;

/// <summary>Reads made files from memory.</summary>
internal static class Import
{
    public static CaptureFile Text(string text, ImportSettings? settings = null, string name = "made.csv") =>
        Bytes(Encoding.UTF8.GetBytes(text), settings, name);

    public static CaptureFile Bytes(byte[] bytes, ImportSettings? settings = null, string name = "made.csv") =>
        CaptureReader.Read(new MemoryStream(bytes), name, settings ?? ImportSettings.Automatic);

    public static ImportException Refusal(string text, ImportSettings? settings = null) =>
        Assert.Throws<ImportException>(() => Text(text, settings));

    public static Waveform Waveform(this CaptureFile file, int index = 0) => Assert.IsType<Waveform>(file.Capture.Channels[index]);

    public static SpectrumTrace Trace(this CaptureFile file, int index = 0) => Assert.IsType<SpectrumTrace>(file.Capture.Channels[index]);
}
