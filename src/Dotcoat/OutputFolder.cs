using System.Security.Cryptography;
using System.Text;
using Colorimetry;

namespace Dotcoat;

/// <summary>One file of a result.</summary>
/// <param name="Name">File name, without a folder.</param>
/// <param name="Bytes">Its content.</param>
internal sealed record OutputFile(string Name, byte[] Bytes)
{
    public OutputFile(string name, string text)
        : this(name, Encoding.UTF8.GetBytes(text))
    {
    }
}

/// <summary>Writes a folder of results so that each file appears whole or not at all.</summary>
/// <remarks>
/// Everything is first written into a staging folder; only when all of it stands on the disk is it moved into place. The folder keeps a list of its files with their SHA-256: a later run replaces a file only if it is on that list
/// and unchanged since, so nothing that a person wrote or edited is ever lost.
/// </remarks>
internal static class OutputFolder
{
    private const string ListName = "dotcoat-files.txt";

    /// <summary>Writes all files or none.</summary>
    /// <param name="folder">Made if it does not exist.</param>
    /// <param name="files">What to write.</param>
    /// <param name="cancellationToken">Checked until the last moment before anything becomes visible.</param>
    /// <exception cref="InputException">A file there was not written by dotcoat, or the folder cannot be written.</exception>
    public static void Write(string folder, IReadOnlyList<OutputFile> files, CancellationToken cancellationToken)
    {
        string target = FullPath(folder);
        var earlier = ReadList(folder, target);
        Refuse(folder, target, files, earlier);
        string list = string.Concat(files.Select(file => $"{Hash(file.Bytes)}  {file.Name}\n"));
        StageAndPlace(folder, target, [.. files, new(ListName, list)], cancellationToken);
        foreach (string stale in earlier.Keys.Except(files.Select(f => f.Name), StringComparer.Ordinal))
            File.Delete(Path.Combine(target, stale));
    }

    /// <summary>Writes files that are the user's from now on, into a new or empty folder and without a list.</summary>
    /// <param name="folder">New or empty.</param>
    /// <param name="files">What to write.</param>
    /// <param name="cancellationToken">Checked until the last moment before anything becomes visible.</param>
    /// <exception cref="InputException">The folder is not empty or cannot be written.</exception>
    public static void WriteNew(string folder, IReadOnlyList<OutputFile> files, CancellationToken cancellationToken)
    {
        string target = FullPath(folder);
        if (File.Exists(target) || (Directory.Exists(target) && Directory.EnumerateFileSystemEntries(target).Any()))
            throw new InputException(new InputFault(folder, null, null, "is there already and is not empty; a new or an empty folder is needed."));
        StageAndPlace(folder, target, files, cancellationToken);
    }

    private static void StageAndPlace(string folder, string target, IReadOnlyList<OutputFile> files, CancellationToken cancellationToken)
    {
        bool isNew = !Directory.Exists(target);
        var madeParents = MissingParents(target);
        // On the same file system in either case, so that the last step is a rename.
        string staging = isNew ? $"{target}.{Path.GetRandomFileName()}" : Path.Combine(target, $".{Path.GetRandomFileName()}");
        try
        {
            Directory.CreateDirectory(staging);
            foreach (var file in files)
            {
                cancellationToken.ThrowIfCancellationRequested();
                File.WriteAllBytes(Path.Combine(staging, file.Name), file.Bytes);
            }

            cancellationToken.ThrowIfCancellationRequested();
            if (isNew)
            {
                Directory.Move(staging, target);
                return;
            }

            foreach (var file in files)
                File.Move(Path.Combine(staging, file.Name), Path.Combine(target, file.Name), overwrite: true);
        }
        catch (Exception failed) when (failed is IOException or UnauthorizedAccessException)
        {
            throw new InputException(new InputFault(folder, null, null, $"cannot be written: {failed.Message}"));
        }
        finally
        {
            if (Directory.Exists(staging))
                Directory.Delete(staging, recursive: true);
            if (!Directory.Exists(target))
                madeParents.Where(Directory.Exists).ToList().ForEach(Directory.Delete);
        }
    }

    private static string FullPath(string folder) => Path.TrimEndingDirectorySeparator(Path.GetFullPath(folder));

    // Deepest first.
    private static List<string> MissingParents(string target)
    {
        var missing = new List<string>();
        for (string? parent = Path.GetDirectoryName(target); parent is not null && !Path.Exists(parent); parent = Path.GetDirectoryName(parent))
            missing.Add(parent);
        return missing;
    }

    private static void Refuse(string folder, string target, IReadOnlyList<OutputFile> files, Dictionary<string, string> earlier)
    {
        if (File.Exists(target))
            throw new InputException(new InputFault(folder, null, null, "is a file; a folder is needed to write into."));
        var faults = new List<InputFault>();
        foreach (string name in files.Select(f => f.Name).Union(earlier.Keys, StringComparer.Ordinal))
        {
            string path = Path.Combine(target, name);
            if (!File.Exists(path))
                continue;
            byte[] standing = File.ReadAllBytes(path);
            // The same bytes again lose nothing, whoever wrote them.
            if (files.FirstOrDefault(f => f.Name == name) is { } file && standing.AsSpan().SequenceEqual(file.Bytes))
                continue;
            if (!earlier.TryGetValue(name, out string? hash))
                faults.Add(new(Path.Combine(folder, name), null, null, "was not written by dotcoat and is not replaced; move it or choose another folder with --out."));
            else if (hash != Hash(standing))
                faults.Add(new(Path.Combine(folder, name), null, null, "was changed since dotcoat wrote it and is not replaced; move it or choose another folder with --out."));
        }

        if (faults.Count > 0)
            throw new InputException(faults);
    }

    private static Dictionary<string, string> ReadList(string folder, string target)
    {
        var list = new Dictionary<string, string>(StringComparer.Ordinal);
        string path = Path.Combine(target, ListName);
        if (!File.Exists(path))
            return list;
        int line = 0;
        foreach (string text in File.ReadLines(path))
        {
            line++;
            string[] parts = text.Split("  ", 2);
            // A name that leads out of the folder would let a doctored list delete files elsewhere.
            if (parts.Length != 2 || parts[0].Length != 64 || parts[1] != Path.GetFileName(parts[1]) || parts[1].Length == 0)
                throw new InputException(new InputFault(Path.Combine(folder, ListName), line, null, "is not a list that dotcoat wrote; move it or choose another folder with --out."));
            list[parts[1]] = parts[0];
        }

        return list;
    }

    private static string Hash(byte[] bytes) => Convert.ToHexStringLower(SHA256.HashData(bytes));
}
