namespace LiveWave.App.Tests;

/// <summary>One run of the program inside the test, with what it printed. One at a time: the console is one.</summary>
internal sealed class ProgramRun
{
    private static readonly Lock OneAtATime = new();

    private ProgramRun(int exitCode, string output, string error) => (ExitCode, Output, Error) = (exitCode, output, error);

    public int ExitCode { get; }

    public string Output { get; }

    public string Error { get; }

    public static ProgramRun Of(params string[] args)
    {
        lock (OneAtATime)
        {
            var (output, error) = (Console.Out, Console.Error);
            using var ownOutput = new StringWriter();
            using var ownError = new StringWriter();
            try
            {
                Console.SetOut(ownOutput);
                Console.SetError(ownError);
                var exitCode = EntryPoint.Run(args);
                return new ProgramRun(exitCode, ownOutput.ToString(), ownError.ToString());
            }
            finally
            {
                Console.SetOut(output);
                Console.SetError(error);
            }
        }
    }
}
