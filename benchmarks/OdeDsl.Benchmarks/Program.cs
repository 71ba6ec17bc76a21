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

if (args is ["generator-sizes"])
{
    GeneratorBenchmarks.WriteSizes(Console.Out);
    return 0;
}

if (args is ["work-precision", ..] or ["compare-with-c", ..] or ["generator-sizes", ..])
{
    Console.Error.WriteLine("Usage: work-precision FILE    writes the work-precision study of the public problems as CSV");
    Console.Error.WriteLine("       compare-with-c         prints a table of emitted equations beside the same in C (needs gcc)");
    Console.Error.WriteLine("       generator-sizes        prints the length of the generated text for flat models of 20 to 2,000 states");
    return 2;
}

BenchmarkSwitcher.FromAssembly(typeof(Program).Assembly).Run(args);
return 0;
