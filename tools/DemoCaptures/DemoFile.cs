namespace ScopeReader.DemoCaptures;

/// <summary>One file of the made set.</summary>
/// <param name="Name">Its name in captures-demo/.</param>
/// <param name="Make">Its bytes, the same at every call.</param>
public sealed record DemoFile(string Name, Func<byte[]> Make);
