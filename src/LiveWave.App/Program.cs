return LiveWave.App.EntryPoint.Run(args, isTerminal: !Console.IsOutputRedirected);
