using System.Text;

namespace Colorimetry.Tests;

/// <summary>Spectrum files that exist as text only.</summary>
internal static class Text
{
    public static SpectrumTable Table(string text, string name = "test.csv") => Table(Encoding.UTF8.GetBytes(text), name);

    public static SpectrumTable Table(byte[] bytes, string name = "test.csv")
    {
        using var stream = new MemoryStream(bytes);
        return SpectrumFile.Read(stream, name);
    }

    /// <summary>Refused with InputException whose text holds what is expected, in one line per fault.</summary>
    public static InputException AssertRefused(Func<object?> read, string expected)
    {
        InputException refusal = Assert.Throws<InputException>(() => { read(); });
        Assert.Contains(expected, refusal.Message, StringComparison.Ordinal);
        Assert.All(refusal.Faults, f => Assert.DoesNotContain('\n', f.ToString()));
        return refusal;
    }
}
