using ScopeReader.Bench;
using ScopeReader.Commands;

namespace ScopeReader;

internal static class Program
{
    private static Task<int> Main(string[] arguments) => CommandLine.Run(arguments, Surroundings.OfProcess(), BenchApp.Run);
}
