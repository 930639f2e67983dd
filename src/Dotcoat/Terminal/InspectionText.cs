using Dotcoat.Inspection;

namespace Dotcoat.Terminal;

/// <summary>What inspect prints.</summary>
internal static class InspectionText
{
    public static string Of(SpectrumInspection inspection)
    {
        var at = inspection.At;
        string unit = inspection.IsAngleTable ? "°" : " nm";
        string step = inspection.StepAt is { } s ? $"step {Figure.Digits(s, 6)}{unit}" : "irregular steps";
        var text = new TerminalText();
        text.Paragraph($"{Path.GetFileName(inspection.Table.Name)}: {string.Join(", ", inspection.Columns.Select(c => c.Kind.Words).Distinct(StringComparer.Ordinal))}; "
            + $"{at.Length} rows, {Figure.Digits(at[0], 6)}–{Figure.Digits(at[^1], 6)}{unit}, {step}.");
        foreach (var column in inspection.Columns)
        {
            if (column.Interpolation is { } interpolation)
                text.Paragraph(interpolation, indent: 2);
        }

        string x = inspection.IsAngleTable ? "°" : "nm";
        text.Gap().Table(
            ["column", $"peak {x}", "peak", "smallest", $"FWHM {x}", $"centroid {x}", "integral"],
            [.. inspection.Columns.Select(Curve)]);
        foreach (var column in inspection.Columns)
            Particulars(text, column);
        return text.Sentences("Warnings", inspection.Warnings).ToString();
    }

    private static string[] Curve(ColumnInspection column) =>
    [
        column.Name,
        Figure.Fixed(column.Figures.PeakAt, 1),
        Figure.Digits(column.Figures.Peak, 5),
        Figure.Digits(column.Figures.Smallest, 3),
        Figure.Fixed(column.Figures.FullWidth, 1),
        Figure.Fixed(column.Figures.Centroid, 1),
        Figure.Digits(column.Figures.Integral, 5),
    ];

    private static void Particulars(TerminalText text, ColumnInspection column)
    {
        if (column.Colour is { } colour)
        {
            text.Gap().Table(
                [$"colour of {column.Name}", "value"],
                [
                    ["observer", colour.Observer],
                    ["X, Y, Z per watt (683 lm/W)", string.Join(", ", new[] { colour.Tristimulus.X, colour.Tristimulus.Y, colour.Tristimulus.Z }.Select(v => Figure.Digits(v, 5)))],
                    ["x, y", $"{Figure.Fixed(colour.Chromaticity.X, 5)}, {Figure.Fixed(colour.Chromaticity.Y, 5)}"],
                    ["u′, v′", $"{Figure.Fixed(colour.Chromaticity.UPrime, 5)}, {Figure.Fixed(colour.Chromaticity.VPrime, 5)}"],
                    ["CCT K", Figure.Fixed(colour.CctKelvin, 0)],
                    ["Duv", Figure.Signed(colour.Duv, 4)],
                    [$"{(colour.Dominant?.IsComplementary == true ? "complementary" : "dominant")} wavelength nm (white E)", Figure.Fixed(colour.Dominant?.WavelengthNm, 1)],
                    ["excitation purity", Figure.Fixed(colour.Dominant?.ExcitationPurityShare, 4)],
                    ["luminous efficacy lm/W", Figure.Fixed(colour.Tristimulus.Y, 2)],
                ]);
        }

        if (column.Excitons.Count > 0)
        {
            text.Gap().Table(
                ["first exciton candidates, from the red end", "nm"],
                [.. column.Excitons.Select(e => new[] { e.IsShoulder ? "shoulder" : "maximum", Figure.Fixed(e.AtNm, 1) })]);
        }

        if (column.Edges.Count > 0)
        {
            text.Gap().Table(
                [$"{column.Name} at half of its peak", "nm"],
                [.. column.Edges.Select(e => new[] { e.Rising ? "rises" : "falls", Figure.Fixed(e.At, 1) })]);
        }

        if (column.HemisphereMean is { } mean)
            text.Gap().Paragraph($"Mean of {column.Name} over the hemisphere, weighted by the cosine: {Figure.Digits(mean, 5)}.");
    }
}
