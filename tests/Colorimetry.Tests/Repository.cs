namespace Colorimetry.Tests;

/// <summary>The checkout that the tests were built from.</summary>
internal static class Repository
{
    /// <summary>The folder that holds Dotcoat.slnx, found upwards from the test's own folder.</summary>
    public static string Root { get; } = Find();

    private static string Find()
    {
        for (var folder = new DirectoryInfo(AppContext.BaseDirectory); folder is not null; folder = folder.Parent)
        {
            if (File.Exists(Path.Combine(folder.FullName, "Dotcoat.slnx")))
                return folder.FullName;
        }

        throw new InvalidOperationException($"No Dotcoat.slnx above {AppContext.BaseDirectory}.");
    }
}
