using BenchmarkDotNet.Running;
using OdeDsl.Benchmarks;

if (args is ["work-precision", string path])
{
    using var file = new StreamWriter(path);
    WorkPrecision.Write(file);
    return 0;
}

if (args is ["compare-with-c"])
{
    CompareWithC.Write(Console.Out);
    return 0;
}

if (args is ["work-precision", ..] or ["compare-with-c", ..])
{
    Console.Error.WriteLine("Usage: work-precision FILE    writes the work-precision study of the public problems as CSV");
    Console.Error.WriteLine("       compare-with-c         prints a table of emitted equations beside the same in C (needs gcc)");
    return 2;
}

BenchmarkSwitcher.FromAssembly(typeof(Program).Assembly).Run(args);
return 0;
