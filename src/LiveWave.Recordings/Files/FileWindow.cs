using LiveWave.Abstractions;
using Microsoft.Win32.SafeHandles;

namespace LiveWave.Recordings;

/// <summary>A file seen through a buffer of fixed size: any place can be looked at, memory doesn't grow with the file, and looking
/// doesn't allocate.</summary>
internal sealed class FileWindow : IDisposable
{
    /// <summary>Buffer for jumping from header to header, where more would be read for nothing.</summary>
    public const int ScanBytes = 4096;

    /// <summary>Buffer for reading on and on.</summary>
    public const int ReadBytes = 1 << 17;

    private readonly SafeFileHandle _file;
    private readonly byte[] _buffer;
    private long _start;
    private int _count;

    private FileWindow(SafeFileHandle file, int bufferBytes)
    {
        _file = file;
        _buffer = new byte[bufferBytes];
        Length = RandomAccess.GetLength(file);
    }

    /// <summary>Bytes of the file when it was opened; what is added later is not read.</summary>
    public long Length { get; }

    /// <summary>Most bytes that can be looked at together.</summary>
    public int Size => _buffer.Length;

    /// <summary>Opens a file for reading, also while another program writes it.</summary>
    /// <param name="path">The file.</param>
    /// <param name="bufferBytes">Most bytes that can be looked at together.</param>
    /// <exception cref="RefusedException">There is no such file, or it can't be opened.</exception>
    public static FileWindow Open(string path, int bufferBytes)
    {
        ArgumentNullException.ThrowIfNull(path);
        SafeFileHandle? file = null;
        try
        {
            if (Directory.Exists(path)) throw new RefusedException("this is a folder", path, "name a recording in it");
            file = File.OpenHandle(path, FileMode.Open, FileAccess.Read, FileShare.ReadWrite);
            return new FileWindow(file, bufferBytes);
        }
        catch (Exception error) when (error is IOException or UnauthorizedAccessException or ArgumentException or NotSupportedException)
        {
            file?.Dispose();
            var missing = error is FileNotFoundException or DirectoryNotFoundException;
            throw missing
                ? new RefusedException("no such file", path, "check the path", error)
                : new RefusedException("the file can't be opened", path, PlainText.Of(error.Message), error);
        }
    }

    /// <summary>Looks at bytes of the file.</summary>
    /// <param name="position">Of the first one, from 0.</param>
    /// <param name="count">How many, at most <see cref="Size"/>.</param>
    /// <returns>Fewer at the end of the file. Valid until the next call.</returns>
    public ReadOnlySpan<byte> Peek(long position, int count)
    {
        if (position < _start || position + count > _start + _count) Fill(position);
        var offset = (int)(position - _start);
        return _buffer.AsSpan(offset, Math.Clamp(_count - offset, 0, count));
    }

    /// <summary>Copies bytes of the file: from the buffer where it holds all of them, else past it.</summary>
    /// <param name="position">Of the first one, from 0.</param>
    /// <param name="into">Filled.</param>
    /// <returns>Bytes copied; fewer at the end of the file.</returns>
    public int Read(long position, Span<byte> into)
    {
        if (position < _start || position + into.Length > _start + _count) return ReadFully(into, position);
        _buffer.AsSpan((int)(position - _start), into.Length).CopyTo(into);
        return into.Length;
    }

    /// <summary>Copies bytes of the file past the buffer. Allocates.</summary>
    /// <param name="position">Of the first one, from 0.</param>
    /// <param name="count">How many; the caller has compared it with <see cref="Length"/>.</param>
    public byte[] Copy(long position, int count)
    {
        var bytes = new byte[count];
        var read = ReadFully(bytes, position);
        return read == count ? bytes : bytes[..read];
    }

    /// <inheritdoc/>
    public void Dispose() => _file.Dispose();

    private void Fill(long position)
    {
        _start = position;
        _count = 0;
        if (position >= Length) return;
        _count = ReadFully(_buffer.AsSpan(0, (int)Math.Min(_buffer.Length, Length - position)), position);
    }

    private int ReadFully(Span<byte> into, long position)
    {
        var read = 0;
        while (read < into.Length)
        {
            var now = RandomAccess.Read(_file, into[read..], position + read);
            if (now == 0) break;
            read += now;
        }

        return read;
    }
}
