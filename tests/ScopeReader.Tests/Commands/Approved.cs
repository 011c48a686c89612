namespace ScopeReader.Tests.Commands;

/// <summary>Compares a text with one that a person has read and approved.</summary>
internal static class Approved
{
    public static void Check(string name, string text)
    {
        string path = Path.Combine(Run.Root, "tests", "ScopeReader.Tests", "Commands", "Approved", name);
        string approved = File.Exists(path) ? File.ReadAllText(path) : "";
        if (text != approved)
            // To be read, and put in the approved text's place if it is better.
            File.WriteAllText(Path.Combine(Run.Root, ".artifacts", name), text);
        Assert.Equal(approved, text);
    }
}
