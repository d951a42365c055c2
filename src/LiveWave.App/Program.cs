return LiveWave.App.EntryPoint.Run(args);
