using BenchmarkDotNet.Running;

// dotnet run -c Release --project tests/PartCheck.Benchmarks -- --filter '*'
BenchmarkSwitcher.FromAssembly(typeof(Program).Assembly).Run(args);
