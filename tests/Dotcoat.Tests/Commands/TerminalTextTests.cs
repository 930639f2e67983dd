using Dotcoat.Terminal;

namespace Dotcoat.Tests.Commands;

public sealed class TerminalTextTests
{
    [Fact]
    public void Table_PastesIntoAMail() => Assert.Equal(
        """
        lot        mg/mL
        ---------  -----
        green A12    6.0
        red C03     1.40

        """,
        new TerminalText().Table(["lot", "mg/mL"], [["green A12", "6.0"], ["red C03", "1.40"]]).ToString());

    [Fact]
    public void Table_WithALongName_CutsTheNameAndKeepsTheNumbers()
    {
        string text = new TerminalText().Table(["name", "value"], [[new string('x', 200), "0.123456789"]]).ToString();
        Assert.All(text.Split('\n'), line => Assert.True(line.Length <= 80));
        Assert.Contains("…  0.123456789", text, StringComparison.Ordinal);
    }

    [Fact]
    public void Paragraph_BreaksAtSpacesAndIndentsWhatFollows()
    {
        string text = new TerminalText().Paragraph("- " + string.Join(' ', Enumerable.Repeat("word", 40)) + " " + new string('/', 200), indent: 2).ToString();
        var lines = text.TrimEnd('\n').Split('\n');
        Assert.All(lines, line => Assert.True(line.Length <= 80));
        Assert.All(lines.Skip(1), line => Assert.StartsWith("  ", line, StringComparison.Ordinal));
        Assert.Equal(200, text.Count(c => c == '/'));
        Assert.Equal(40, text.Split("word").Length - 1);
    }

    [Theory]
    [InlineData(-0.00314, 4, "−0.0031")]
    [InlineData(0.5, 2, "0.50")]
    public void Fixed_HasATrueMinus(double value, int decimals, string expected) => Assert.Equal(expected, Figure.Fixed(value, decimals));

    [Fact]
    public void Figures_OfWhatIsNotKnown_AreADash() => Assert.Equal("–––", Figure.Fixed(null, 1) + Figure.Signed(null, 1) + Figure.Digits(null, 1));

    [Fact]
    public void Signed_AlwaysHasASign() => Assert.Equal("+0.003 −0.003", $"{Figure.Signed(0.003, 3)} {Figure.Signed(-0.003, 3)}");
}
