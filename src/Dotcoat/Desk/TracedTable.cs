using Dotcoat.Terminal;
using FilmOptics;

namespace Dotcoat.Desk;

/// <summary>The photon budget traced, with its standard errors, beside the exact one.</summary>
internal static class TracedTable
{
    public static FigureTable Of(FilmCase filmCase, FilmAppraisal traced, FilmAppraisal exact)
    {
        var (found, error, wanted) = (traced.Output.Budget, traced.Output.Tracing!.StandardError, exact.Output.Budget);
        return new("traced", ["where each source photon goes", "traced", "standard error", "exact"], [.. Rows()]);

        IEnumerable<string[]> Rows()
        {
            yield return Row("leaves above unconverted", found.Unconverted, error.Unconverted, wanted.Unconverted);
            yield return Row("leaves above converted", found.Converted, error.Converted, wanted.Converted);
            yield return Row("lost below", found.LostBelow, error.LostBelow, wanted.LostBelow);
            yield return Row("lost above", found.LostAbove, error.LostAbove, wanted.LostAbove);
            yield return Row("lost in the host", found.LostInHost, error.LostInHost, wanted.LostInHost);
            yield return Row("lost at the edges", found.LostAtEdges, error.LostAtEdges, wanted.LostAtEdges);
            for (int i = 0; i < filmCase.Film.Lots.Count; i++)
                yield return Row($"lost in {filmCase.Film.Lots[i].Name}", found.LostInLots[i], error.LostInLots[i], wanted.LostInLots[i]);
        }

        static string[] Row(string name, double traced, double error, double exact) =>
            [name, Figure.Fixed(traced, 5), Figure.Fixed(error, 5), Figure.Fixed(exact, 5)];
    }
}
