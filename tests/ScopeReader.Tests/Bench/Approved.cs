namespace ScopeReader.Tests.Bench;

/// <summary>Holds a picture in characters against the one that a person has looked at and approved.</summary>
internal static class Approved
{
    public static void Check(string name, string picture)
    {
        string file = Path.Combine(AppContext.BaseDirectory, "Bench", "Approved", name + ".txt");
        string approved = File.Exists(file) ? File.ReadAllText(file) : "";
        if (approved == picture)
            return;
        // Beside the approved one in the build's output: look at it, and if it is better, copy it over.
        Directory.CreateDirectory(Path.GetDirectoryName(file)!);
        File.WriteAllText(Path.ChangeExtension(file, ".received.txt"), picture);
        Assert.Fail($"{name} differs from the approved picture; received:\n{picture}");
    }
}
