using BenchmarkDotNet.Running;
using OdeDsl.Benchmarks;

if (args is ["work-precision", string path])
{
    using var file = new StreamWriter(path);
    WorkPrecision.Write(file);
    return 0;
}

if (args is ["work-precision", ..])
{
    Console.Error.WriteLine("Usage: work-precision FILE    writes the work-precision study of the public problems as CSV");
    return 2;
}

BenchmarkSwitcher.FromAssembly(typeof(Program).Assembly).Run(args);
return 0;
