namespace Dotcoat.Tests.Commands;

/// <summary>A temporary folder to run commands in, as a user would in a shell. Removed in the end.</summary>
internal sealed class Workshop : IDisposable
{
    public Workshop()
    {
        Folder = Directory.CreateTempSubdirectory("dotcoat-test-").FullName;
    }

    /// <summary>The folder.</summary>
    public string Folder { get; }

    /// <summary>With a copy of spectra/demo at the same relative path as in the repository.</summary>
    public static Workshop WithDemo()
    {
        var workshop = new Workshop();
        Directory.CreateDirectory(workshop.PathOf("spectra/demo"));
        foreach (string file in Directory.EnumerateFiles(Path.Combine(Repository.Root, "spectra", "demo")))
            File.Copy(file, workshop.PathOf(Path.Combine("spectra/demo", Path.GetFileName(file))));
        return workshop;
    }

    public string PathOf(string relative) => Path.Combine(Folder, relative);

    public string Read(string relative) => File.ReadAllText(PathOf(relative));

    public void Write(string relative, string text) => File.WriteAllText(PathOf(relative), text);

    /// <summary>Every file in the folder, relative.</summary>
    public string[] Files() =>
        [.. Directory.EnumerateFiles(Folder, "*", SearchOption.AllDirectories).Select(f => Path.GetRelativePath(Folder, f)).Order(StringComparer.Ordinal)];

    /// <summary>Runs a command in the folder.</summary>
    public Outcome Run(params string[] arguments) => Run(CancellationToken.None, arguments);

    /// <summary>Runs a command in the folder that may be interrupted.</summary>
    public Outcome Run(CancellationToken cancellationToken, params string[] arguments)
    {
        using var output = new StringWriter();
        using var error = new StringWriter();
        int status = CommandLine.Run(arguments, new CommandContext(output, error, Folder, cancellationToken));
        // The folder is an accident of the test; a user has "" there.
        return new(status, output.ToString(), error.ToString().Replace(Folder + Path.DirectorySeparatorChar, "", StringComparison.Ordinal));
    }

    public void Dispose() => Directory.Delete(Folder, recursive: true);
}

/// <summary>What a command left.</summary>
internal sealed record Outcome(int Status, string Output, string Error)
{
    public string[] ErrorLines => Error.Split('\n', StringSplitOptions.RemoveEmptyEntries);

    /// <summary>Bad input: status 2, nothing on standard output, this many lines of error.</summary>
    public Outcome AssertRefused(int lines = 1)
    {
        Assert.True(Status == 2, $"status {Status}: {Error}");
        Assert.Equal("", Output);
        Assert.True(ErrorLines.Length == lines, $"{ErrorLines.Length} lines, not {lines}:\n{Error}");
        Assert.DoesNotContain("Exception", Error, StringComparison.Ordinal);
        Assert.DoesNotContain("   at ", Error, StringComparison.Ordinal);
        return this;
    }

    /// <summary>Success without a word on standard error but for progress, which a busy machine brings.</summary>
    public Outcome AssertDone()
    {
        Assert.True(Status == 0, $"status {Status}: {Error}");
        Assert.All(ErrorLines, line => Assert.EndsWith(" …", line, StringComparison.Ordinal));
        return this;
    }

    /// <summary>Plain text that pastes into a mail.</summary>
    public Outcome AssertPlain()
    {
        Assert.DoesNotContain('\u001b', Output);
        Assert.DoesNotContain('\t', Output);
        Assert.DoesNotContain("NaN", Output, StringComparison.Ordinal);
        Assert.All(Output.Split('\n'), line => Assert.True(line.Length <= 80, $"{line.Length} columns: {line}"));
        return this;
    }
}
