using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>What to call a frame that was searched for planar waves alone.</summary>
internal static class PlanarKind
{
    private const double StandingFrom = 0.75;      // |Σz²|/Σ|z|² of a real pattern times one phase, with some noise on it
    private const double UniformFrom = 0.5;        // squared resultant of the phases
    private const double NodesFrom = 0.15;         // share of energy that swings against the rest; a 50:50 split has 0.5

    /// <summary>The kind of a frame with enough evidence of a common rhythm.</summary>
    /// <param name="frame">The frame.</param>
    /// <param name="isPlanar">Evidence of a planar wave and both gates passed.</param>
    /// <param name="beatsUniform">The first gate is passed: a plane says more than one phase all over.</param>
    /// <param name="isOutOfPhase">The second gate is passed.</param>
    /// <param name="excludesWavesOfInterest">Every wave of interest would have been seen.</param>
    public static WaveKind Of(
        WhitenedFrame frame, bool isPlanar, bool beatsUniform, bool isOutOfPhase, bool excludesWavesOfInterest)
    {
        if (isPlanar) return WaveKind.Planar;
        var isUniform = frame.UniformShare >= UniformFrom;
        if (!isOutOfPhase && frame.StandingShare >= StandingFrom && (!isUniform || beatsUniform))
        {
            // A field in phase without nodes is what volume conduction makes; 'standing' is for patterns that have them.
            return !isUniform && frame.OppositeShare() >= NodesFrom ? WaveKind.Standing : WaveKind.InPhase;
        }

        return isUniform && excludesWavesOfInterest ? WaveKind.Synchronous : WaveKind.NotResolved;
    }
}
