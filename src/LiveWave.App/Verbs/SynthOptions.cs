namespace LiveWave.App;

/// <summary>What the command line asks of <c>synth</c>.</summary>
/// <param name="ScenePath">The scene.</param>
/// <param name="Out">The recording to make.</param>
/// <param name="Json">The summary as JSON.</param>
internal sealed record SynthOptions(string ScenePath, string Out, bool Json);
