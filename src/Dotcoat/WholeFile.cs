namespace Dotcoat;

/// <summary>Writes one file so that it appears whole or not at all.</summary>
internal static class WholeFile
{
    /// <summary>Writes beside the target and moves into place.</summary>
    public static void Write(string path, byte[] bytes)
    {
        string staged = $"{path}.{Path.GetRandomFileName()}";
        try
        {
            File.WriteAllBytes(staged, bytes);
            File.Move(staged, path, overwrite: true);
        }
        finally
        {
            File.Delete(staged);
        }
    }
}
