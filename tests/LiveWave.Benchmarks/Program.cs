using System.Globalization;
using LiveWave.Benchmarks;

// usage: dotnet run -c Release --project tests/LiveWave.Benchmarks -- [SECONDS]     (default 60 for each block size)
var seconds = args.Length > 0 ? double.Parse(args[0], CultureInfo.InvariantCulture) : 60;
var setup = DemoSetup.WithoutRest();
foreach (var blockRows in (int[])[1, 32]) new PathLatency(setup, seconds).Run(blockRows);
return 0;
