using System.Globalization;
using Colorimetry;
using FilmOptics;

namespace FilmDesign;

/// <summary>Says why a white cannot be reached: what was found, what it means, what to do.</summary>
/// <remarks>
/// Reasons are found by asking what would help: without the target's bounds, without bypass, with another emission peak. The first
/// that does is the reason, so that no reason is given that would not be a way out.
/// </remarks>
internal static class LoadingLimit
{
    private const string Advice =
        " Raise the yields, reduce the overlap of one lot's absorption with the other's emission, or take lots that absorb all of the source's band.";

    public static string Explain(LoadingProblem problem, LoadingPoint best, FilmOutput output)
    {
        var nearest = problem.ChromaticityOf(output);
        return $"White cannot reach {Text(problem.Wanted)}: {Reason(problem, best)} Nearest white {Text(nearest)}.";
    }

    /// <summary>x, y with four decimals.</summary>
    public static string Text(Chromaticity c) => string.Create(CultureInfo.InvariantCulture, $"{c.X:0.0000}, {c.Y:0.0000}");

    private static string Reason(LoadingProblem problem, LoadingPoint best)
    {
        if (DeadLot(problem) is { } dead)
            return dead;

        var unbounded = problem.WithoutBounds();
        var box = LoadingBox.Unbounded(unbounded);
        var free = LoadingSolver.Best(unbounded, box, best);
        if (IsReached(problem, free))
            return Bound(problem, free);

        var sealedFilm = unbounded.WithoutBypass();
        if (problem.FilmCase.Film.Cavity.BypassShare > 0 && LoadingSolver.Best(sealedFilm, box, best) is var tight && IsReached(problem, tight))
            return Bypass(problem, sealedFilm, tight);

        var alone = unbounded.WithoutFixedLots(out var fixedLots);
        if (fixedLots.Count > 0 && IsReached(problem, LoadingSolver.Best(alone, box, best)))
            return Fixed(fixedLots);

        var output = unbounded.OutputAt(free.FirstMgPerMl, free.SecondMgPerMl);
        // Where a lot is at zero its light has no colour: a trace of it shows the colour it would have.
        var probe = unbounded.OutputAt(Math.Max(free.FirstMgPerMl, box.Unit[0] * 1e-3), Math.Max(free.SecondMgPerMl, box.Unit[1] * 1e-3));
        if (MixTriangle.Of(problem, probe) is not { } triangle)
            return "light of one of the lots never comes out above. Raise its yield or the opening above.";
        return triangle.OutsideReason() ?? triangle.ShortLight(output) + Advice;
    }

    private static bool IsReached(LoadingProblem problem, LoadingPoint point) => point.DistanceXy <= problem.Target.ToleranceXy;

    private static string? DeadLot(LoadingProblem problem)
    {
        // At its bounds and with the other lot shining: what is not excited then never is.
        var box = LoadingBox.Of(problem);
        var probe = problem.OutputAt(Math.Min(box.Unit[0], box.Max[0]), Math.Min(box.Unit[1], box.Max[1]));
        for (int i = 0; i < 2; i++)
        {
            var lot = problem.Lot(i);
            if (probe.Budget.Excitations[problem.FilmCase.Film.IndexOf(lot)] < 1e-12)
                return $"{lot.Name} absorbs none of this light, so its loading changes nothing. Choose a lot whose absorbance covers {Nm(problem.SourcePeakNm)}.";
            if (lot.FilmYieldShare == 0)
                return $"{lot.Name} has a quantum yield of 0 in the film, so it emits nothing. Check quantum_yield and film_yield_factor.";
        }

        return null;
    }

    private static string Bound(LoadingProblem problem, LoadingPoint free)
    {
        if (!problem.HasRoomFor(free.FirstMgPerMl, free.SecondMgPerMl))
        {
            return $"it needs {Mg(free.FirstMgPerMl)} of {problem.Lot(0).Name} and {Mg(free.SecondMgPerMl)} of {problem.Lot(1).Name}, which is more than the layer has room for. "
                + "Coat thicker, or take lots that absorb more.";
        }

        double[] needed = [free.FirstMgPerMl, free.SecondMgPerMl];
        var bounds = problem.Target.Free;
        string[] above = [.. Enumerable.Range(0, 2).Where(i => needed[i] > bounds[i].MaxMgPerMl)
            .Select(i => $"{Mg(needed[i])} of {bounds[i].LotName}, above the bound of {Mg(bounds[i].MaxMgPerMl)}")];
        string[] below = [.. Enumerable.Range(0, 2).Where(i => needed[i] < bounds[i].MinMgPerMl)
            .Select(i => $"{Mg(needed[i])} of {bounds[i].LotName}, below the bound of {Mg(bounds[i].MinMgPerMl)}")];
        return $"it needs {string.Join(", and ", above.Concat(below))}."
            + (above.Length > 0 ? " Raise the upper bound, coat thicker, or take a lot that absorbs more." : "")
            + (below.Length > 0 ? " Lower the lower bound, or coat thinner." : "");
    }

    private static string Fixed(IReadOnlyList<string> lots) =>
        $"the target is in reach without {string.Join(" and ", lots)}, whose loading is held fixed: its light is there whatever the free lots do. Lower that loading, or free it.";

    private static string Bypass(LoadingProblem problem, LoadingProblem sealedFilm, LoadingPoint tight)
    {
        var budget = sealedFilm.OutputAt(tight.FirstMgPerMl, tight.SecondMgPerMl).Budget;
        var cavity = problem.FilmCase.Film.Cavity;
        return string.Create(
            CultureInfo.InvariantCulture,
            $"{100 * cavity.BypassShare:0.#} % of the source light misses the film, and no loading takes that blue away. A film without gaps would be on target with {100 * budget.Unconverted:0.#} % of the source photons left above. Close the gaps (cavity.bypass_share) or return more light from above.");
    }

    private static string Mg(double mgPerMl) => mgPerMl.ToString(mgPerMl >= 100 ? "0" : "0.###", CultureInfo.InvariantCulture) + " mg/mL";

    private static string Nm(double nm) => nm.ToString("0", CultureInfo.InvariantCulture) + " nm";
}
