namespace LiveWave.Display;

/// <summary>A way to show a session on a terminal.</summary>
internal interface IFace
{
    /// <summary>Shows how it stands. The view's thread.</summary>
    /// <param name="picture">What is known.</param>
    void Show(SessionPicture picture);
}
