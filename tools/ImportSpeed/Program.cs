using System.Diagnostics;
using System.Globalization;
using ScopeReader.Captures;
using ScopeReader.Files;
using ScopeReader.ImportSpeed;

// Usage: ImportSpeed shapes                    the shapes that it makes
//        ImportSpeed make SHAPE ROWS FILE      writes a made export and prints its length as UTF-8 text
//        ImportSpeed read FILE [TIMES]         reads it that often and prints each time and the peak memory
switch (args)
{
    case ["shapes"]:
        Console.WriteLine(string.Join(' ', Made.Shapes));
        return 0;
    case ["make", var shape, var rows, var file]:
        using (Stream stream = File.Create(file))
            Made.Write(stream, shape, long.Parse(rows, CultureInfo.InvariantCulture));
        return 0;
    case ["read", var file, ..]:
        int times = args.Length > 2 ? int.Parse(args[2], CultureInfo.InvariantCulture) : 1;
        for (int i = 0; i < times; i++)
        {
            long start = Stopwatch.GetTimestamp();
            TimeSpan cpu = Process.GetCurrentProcess().TotalProcessorTime;
            CaptureFile read = CaptureReader.Read(file, ImportSettings.Automatic);
            double seconds = Stopwatch.GetElapsedTime(start).TotalSeconds, used = (Process.GetCurrentProcess().TotalProcessorTime - cpu).TotalSeconds;
            Console.WriteLine(string.Create(CultureInfo.InvariantCulture, $"{seconds:F3} s, {used:F3} s of processor, {new FileInfo(file).Length / seconds / 1e6:F0} MB/s, {read.Capture.Channels.Sum(c => (long)c.Count)} samples"));
        }
        return 0;
    default:
        Console.Error.WriteLine("usage: ImportSpeed shapes, ImportSpeed make SHAPE ROWS FILE, or ImportSpeed read FILE [TIMES]");
        return 64;
}
