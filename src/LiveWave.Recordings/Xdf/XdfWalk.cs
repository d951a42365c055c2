namespace LiveWave.Recordings;

/// <summary>Goes through the chunks of an XDF file, and finds its way again after damage: at the next boundary whose following chunk
/// looks sound. Linear in the length of the file, whatever is in it.</summary>
/// <param name="window">The file; it begins with the magic.</param>
/// <param name="layout">The grammar.</param>
/// <param name="warnings">Told of every loss.</param>
internal sealed class XdfWalk(FileWindow window, XdfLayout layout, ReadWarnings warnings)
{
    private const int MagicBytes = 4;

    private long _next = MagicBytes;

    // End of what was read and made sense. A search for the next boundary begins one byte behind it, so a wrong length of a chunk
    // that was merely passed over can't hide the boundaries it jumped across.
    private long _soundEnd = MagicBytes;

    /// <summary>How often the way was lost: whoever counts on having seen every chunk compares.</summary>
    public int Losses { get; private set; }

    /// <summary>Takes the next chunk. Boundaries are passed silently.</summary>
    /// <param name="chunk">The chunk; a cut one only if it is the last and its samples fit its length.</param>
    /// <returns>False at the end.</returns>
    public bool TryNext(out XdfChunk chunk)
    {
        while (_next < window.Length)
        {
            var position = _next;
            var flaw = layout.Frame(position, out chunk);
            if (flaw is null && chunk.Tag == XdfTag.Boundary)
            {
                if (layout.Fits(chunk)) Pass(chunk);
                else Recover(position, "a boundary without its signature", default);
                continue;
            }

            if (flaw is null)
            {
                _next = chunk.End;
                if (position > _soundEnd) _soundEnd = position;
                return true;
            }

            if (Recover(position, flaw, chunk)) return true;
        }

        chunk = default;
        return false;
    }

    /// <summary>The chunk just taken made sense.</summary>
    /// <param name="chunk">The chunk.</param>
    public void Confirm(in XdfChunk chunk) => _soundEnd = chunk.End;

    /// <summary>The chunk just taken is damaged: goes on behind it if that looks sound, else at the next boundary.</summary>
    /// <param name="chunk">The chunk.</param>
    /// <param name="at">First byte that makes no sense.</param>
    /// <param name="flaw">What is wrong.</param>
    public void Reject(in XdfChunk chunk, long at, string flaw)
    {
        if (layout.LooksSound(chunk.End))
        {
            warnings.Add(at, flaw, chunk.End - at);
            _soundEnd = chunk.End;
            return;
        }

        if (at > _soundEnd) _soundEnd = at;
        Recover(at, flaw, default);
    }

    private void Pass(in XdfChunk chunk)
    {
        _next = chunk.End;
        Confirm(chunk);
    }

    private bool Recover(long at, string flaw, in XdfChunk cut)
    {
        Losses++;
        var lost = _soundEnd;
        var found = layout.AfterNextSignature(lost + 1);
        while (found >= 0 && !layout.LooksSound(found)) found = layout.AfterNextSignature(found);
        if (found >= 0)
        {
            warnings.Add(at, flaw, found - lost);
            _next = found;
            _soundEnd = found;
            return false;
        }

        _next = window.Length;
        var isReadable = cut.IsCut && cut.Tag == XdfTag.Samples && layout.Fits(cut);
        warnings.Add(at, isReadable ? flaw + ": what is whole of it is read" : flaw, isReadable ? 0 : window.Length - lost);
        return isReadable;
    }
}
