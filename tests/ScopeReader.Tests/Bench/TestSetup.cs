using System.Runtime.CompilerServices;

// The terminal library keeps settings for the whole process.
[assembly: CollectionBehavior(DisableTestParallelization = true)]

namespace ScopeReader.Tests.Bench;

internal static class TestSetup
{
    // Before any type of the library is touched: no test may write to the terminal that it is run from.
    [ModuleInitializer]
    internal static void WithoutTerminal() => Environment.SetEnvironmentVariable("DisableRealDriverIO", "1");
}
