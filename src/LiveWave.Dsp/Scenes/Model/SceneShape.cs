namespace LiveWave.Dsp;

/// <summary>Shapes of a field in phase.</summary>
public enum SceneShape
{
    /// <summary>A bump, standard deviation 0.35 apertures, about the event's centre.</summary>
    Focus,

    /// <summary>A bump, standard deviation 0.5 apertures, half an aperture off the event's centre towards its direction.</summary>
    EdgeFocus,

    /// <summary>Rises along the event's direction, from 0.2 to 1 over an aperture.</summary>
    Ramp,

    /// <summary>Two bumps of opposite sign, 0.4 apertures to either side along the event's direction.</summary>
    TwoPoles,
}
