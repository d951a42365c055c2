using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>One patch of a run: takes its channels out of the row and steps its bands.</summary>
public sealed class PatchTrack
{
    private readonly int[] _channels;
    private readonly double[] _row;
    private readonly PhaseTrack[] _bands;
    private readonly int[] _trackNumbers;

    internal PatchTrack(
        PatchSetup patch,
        int number,
        RunSetup setup,
        StreamFormat conditioned,
        long indexStep,
        Action<string, Exception> onFault,
        IReadOnlyList<PhaseSnapshot> watched)
    {
        _channels = [.. patch.Channels];
        _row = new double[_channels.Length];
        var format = conditioned.Select(_channels);
        _trackNumbers = [.. Enumerable.Range(0, setup.Tracks.Count).Where(at => setup.Tracks[at].Patch == number)];
        _bands = [.. _trackNumbers.Select(at => new PhaseTrack(setup.Tracks[at], patch, format, indexStep, onFault, watched.ElementAtOrDefault(at)))];
    }

    internal PhaseTrack BandOf(int track) => _bands[Array.IndexOf(_trackNumbers, track)];

    internal void StepPhase(in RowInstant now, ReadOnlySpan<double> conditioned)
    {
        for (var i = 0; i < _channels.Length; i++) _row[i] = conditioned[_channels[i]];
        foreach (var band in _bands) band.Step(now, _row);
    }

    internal void Reset()
    {
        foreach (var band in _bands) band.Reset();
    }
}
