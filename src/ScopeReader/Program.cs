using ScopeReader.Commands;

namespace ScopeReader;

internal static class Program
{
    private static Task<int> Main(string[] arguments) => CommandLine.Run(arguments, Surroundings.OfProcess(), (_, _, _, _) => ExitStatus.Fault);
}
