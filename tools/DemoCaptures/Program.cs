using ScopeReader.DemoCaptures;

// Rewrites the captures in captures-demo/; its plans and its README are written by hand.
string folder = args.Length > 0 ? args[0] : Path.Combine(Top(), "captures-demo");
Directory.CreateDirectory(folder);
foreach (DemoFile file in DemoSet.All)
{
    byte[] bytes = file.Make();
    File.WriteAllBytes(Path.Combine(folder, file.Name), bytes);
    Console.WriteLine($"{file.Name}: {bytes.Length} bytes");
}

static string Top()
{
    DirectoryInfo? here = new(Directory.GetCurrentDirectory());
    while (here is not null && !File.Exists(Path.Combine(here.FullName, "ScopeReader.sln")))
        here = here.Parent;
    return here?.FullName ?? throw new DirectoryNotFoundException("run this inside the repository, or name the folder to write to");
}
