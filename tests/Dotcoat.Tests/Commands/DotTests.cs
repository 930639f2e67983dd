using System.Text.Json.Nodes;

namespace Dotcoat.Tests.Commands;

/// <summary>dotcoat dot, as its user runs it.</summary>
public sealed class DotTests
{
    [Fact]
    public void Diameter_AndPeak_AreTheSameDot()
    {
        using var workshop = new Workshop();
        var byPeak = JsonNode.Parse(workshop.Run("dot", "--material", "CdSe", "--peak-nm", "550", "--json").AssertDone().Output)!;
        // Yu et al. 2003 at 550 nm: 3.0403 nm.
        Assert.Equal(3.0403, (double)byPeak["sizing_curves"]![0]!["diameter_nm"]!, 5.5e-5);
        var bySize = JsonNode.Parse(workshop.Run("dot", "--material", "CdSe", "--diameter-nm", "3.0403", "--json").AssertDone().Output)!;
        Assert.Equal(550, (double)bySize["sizing_curves"]![0]!["peak_nm"]!, 0.01);
    }

    [Fact]
    public void Shell_AndSpread_AreInTheTables()
    {
        using var workshop = new Workshop();
        string text = workshop.Run("dot", "--material", "CdSe", "--diameter-nm", "4", "--shell", "CdS", "--shell-nm", "1", "--size-spread-percent", "5").AssertDone().Output;
        Assert.Contains("with 1 nm of CdS", text, StringComparison.Ordinal);
        Assert.Contains("too blue", text, StringComparison.Ordinal);
        Assert.Contains("line in all, FWHM", text, StringComparison.Ordinal);
    }

    [Fact]
    public void AMaterialWithoutACurve_SaysSo()
    {
        using var workshop = new Workshop();
        string text = workshop.Run("dot", "--material", "InP", "--diameter-nm", "3", "--alloy-with", "ZnSe", "--alloy-share", "0.1").AssertDone().Output;
        Assert.Contains("no sizing curve", text, StringComparison.Ordinal);
    }

    [Fact]
    public void Heat_ShiftsTheLineToTheRed()
    {
        using var workshop = new Workshop();
        var document = JsonNode.Parse(workshop.Run("dot", "--material", "CdSe", "--peak-nm", "530", "--temperature-k", "320", "--json").AssertDone().Output)!;
        // 0.0595 nm/K at 300 K and 530 nm (α 3.2e-4, β 220; computed by an independent code), slowly rising.
        Assert.Equal(20 * 0.0595, (double)document["heat_shift_nm"]!, 0.03);
        Assert.Contains("not known", workshop.Run("dot", "--material", "ZnSe", "--diameter-nm", "4", "--temperature-k", "320").AssertDone().Output, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("one of them alone", "--material", "CdSe")]
    [InlineData("one of them alone", "--material", "CdSe", "--diameter-nm", "3", "--peak-nm", "550")]
    [InlineData("belong together", "--material", "CdSe", "--diameter-nm", "3", "--shell", "CdS")]
    [InlineData("from 0.4 to 50", "--material", "CdSe", "--diameter-nm", "-1")]
    [InlineData("'Gold' is not known", "--material", "Gold", "--diameter-nm", "3")]
    [InlineData("no InP dot", "--material", "InP", "--peak-nm", "1500")]
    [InlineData("band edges of CsPbBr3", "--material", "CdSe", "--diameter-nm", "3", "--shell", "CsPbBr3", "--shell-nm", "1")]
    public void BadInput_IsRefused(string message, params string[] arguments)
    {
        using var workshop = new Workshop();
        Assert.Contains(message, workshop.Run(["dot", .. arguments]).AssertRefused(lines: message.Contains("alone", StringComparison.Ordinal) || message.Contains("together", StringComparison.Ordinal) || message.Contains("from 0.4", StringComparison.Ordinal) ? 2 : 1).Error, StringComparison.Ordinal);
    }
}
