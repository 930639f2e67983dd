namespace Dotcoat;

/// <summary>What a command may touch of the world outside.</summary>
/// <param name="Output">Results, and nothing else.</param>
/// <param name="Error">Messages and progress.</param>
/// <param name="Folder">What relative paths are relative to; empty for the process's current folder.</param>
/// <param name="CancellationToken">Set by Ctrl-C.</param>
internal sealed record CommandContext(TextWriter Output, TextWriter Error, string Folder, CancellationToken CancellationToken)
{
    /// <summary>A path as the user wrote it, made usable.</summary>
    public string PathOf(string path) => Path.Combine(Folder, path);
}
