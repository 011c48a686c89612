using System.Globalization;
using ScopeReader.ArchiveTrials;

// Trials of the archive that are too long for the tests: see the usage below.
string[] words = args;
int Whole(int index, int otherwise) => words.Length > index ? int.Parse(words[index], CultureInfo.InvariantCulture) : otherwise;

switch (words)
{
    case ["make", string path, ..]:
        return Maker.Run(path, Whole(2, 100_000));
    case ["benchmark", string path, ..]:
        return Benchmark.Run(path);
    case ["add", string path, ..]:
        return Adder.Run(path, Whole(2, int.MaxValue), Whole(3, 1));
    case ["kill", string path, ..]:
        return KillLoop.Run(path, Whole(2, 200), Whole(3, 7), Console.Out) is { Lost: 0, Damages: 0 } ? 0 : 1;
    default:
        Console.Error.WriteLine(
            """
            make ARCHIVE [COUNT]        fills a new archive with entries made from seeds; 100000 by default
            benchmark ARCHIVE           times searches in it, adding, and how small captures get
            kill ARCHIVE [RUNS [SEED]]  kills a program that adds, checks what it had acknowledged; 200 times by default
            add ARCHIVE [COUNT [SEED]]  adds, printing each entry's number and hash once it is acknowledged
            """);
        return 64;
}
