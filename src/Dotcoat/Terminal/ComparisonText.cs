using FilmDesign;
using FilmOptics;

namespace Dotcoat.Terminal;

/// <summary>A comparison of models for the terminal: the answer, the models, their differences and the reasons.</summary>
internal static class ComparisonText
{
    public static string Of(FilmCase filmCase, ModelComparison comparison)
    {
        var text = new TerminalText();
        text.Paragraph(Answer(filmCase, comparison));
        text.Paragraph($"Film: {filmCase.Film.Title}. Observer: {filmCase.Observer.Name}. Shares per source photon.");
        text.Gap().Table(
            ["model, white", "x", "y", "unconverted", "converted", "lm/W", "stated error"],
            [.. comparison.Models.Select(m =>
            {
                var white = ModelComparison.JudgedWhite(filmCase, m);
                return new[]
                {
                    m.Output.Model, Figure.Fixed(white.X, 4), Figure.Fixed(white.Y, 4), Figure.Fixed(m.Output.Budget.Unconverted, 4),
                    Figure.Fixed(m.Output.Budget.Converted, 4), Figure.Fixed(m.FilmLumensPerSourceWatt, 1), StatedError(m.Output),
                };
            })]);
        text.Gap().Table(
            [$"less {comparison.Models[0].Output.Model}", "share", "difference", "stated errors", "explained"],
            [.. comparison.Differences.Select(d => new[]
            {
                $"{d.Model}: {d.Quantity.Replace('_', ' ')}", Figure.Fixed(d.Value, 5), Figure.Signed(d.Difference, 5),
                Figure.Digits(d.StatedErrorShare, 2), d.IsExplained switch { true => "yes", false => "no", _ => "–" },
            })]);
        if (comparison.Features.Count > 0)
        {
            text.Gap().Paragraph($"Why: {comparison.Models[0].Output.Model} on the same film with one feature taken away, which the quick model never sees.");
            text.Table(
                ["without", "unconverted", "converted", "white shift u′v′"],
                [.. comparison.Features.Select(f => new[] { f.Feature, Figure.Fixed(f.Unconverted, 4), Figure.Fixed(f.Converted, 4), Figure.Fixed(f.WhiteShiftUv, 4) })]);
        }

        text.Gap().Paragraph(Mending(comparison));
        return text.Sentences("Warnings", [.. comparison.Models.SelectMany(m => m.Warnings).Distinct(StringComparer.Ordinal)]).ToString();
    }

    private static string Answer(FilmCase filmCase, ModelComparison comparison)
    {
        var exact = comparison.Models[0];
        var white = ModelComparison.JudgedWhite(filmCase, exact);
        var quick = comparison.Models.FirstOrDefault(m => m.Output.Model == FilmModels.BeerLambert);
        int unexplained = comparison.Differences.Count(d => d.IsExplained == false);
        string agreement = unexplained == 0
            ? "Every difference between the exact and the traced model lies within what they state."
            : $"{unexplained} differences between the exact and the traced model exceed what they state.";
        if (quick is null)
            return agreement;
        double shift = white.DistanceUvTo(ModelComparison.JudgedWhite(filmCase, quick));
        return $"{agreement} The quick model puts white {Figure.Fixed(shift, 4)} in u′v′ off and blue leakage {Figure.Signed(quick.Output.Budget.Unconverted - exact.Output.Budget.Unconverted, 4)} off.";
    }

    private static string StatedError(FilmOutput output) =>
        output.Accuracy is { } accuracy ? Figure.Digits(accuracy.EstimateShare, 2)
        : output.Tracing is { } tracing ? $"{Figure.Digits(tracing.StandardError.Converted, 2)} (1 s.e.)"
        : "–";

    private static string Mending(ModelComparison comparison) => comparison.SuggestedPaths is { PumpPathFactor: { } pump, EmissionPathFactor: { } emission }
        ? $"With beer_lambert: {{pump_path: {Figure.Fixed(pump, 3)}, emission_path: {Figure.Fixed(emission, 3)}}} the quick model gives this film's leakage and comes within {Figure.Fixed(comparison.SuggestedWhiteErrorUv, 4)} in u′v′ of its white. Another film needs other paths."
        : "No path lengths make the quick model give this film's leakage.";
}
