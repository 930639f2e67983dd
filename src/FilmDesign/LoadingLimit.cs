using System.Globalization;
using Colorimetry;
using FilmOptics;

namespace FilmDesign;

/// <summary>Says why a white cannot be reached: what was found, what it means, what to do.</summary>
internal static class LoadingLimit
{
    private const double AtBoundShare = 1e-3;

    public static string Explain(LoadingProblem problem, LoadingBox box, LoadingPoint best, FilmOutput output)
    {
        var nearest = new WhiteMeter(problem.FilmCase, problem.Target.Place).Read(output).Chromaticity;
        return $"White cannot reach {Text(problem.Wanted)}: {Reason(problem, box, best)} Nearest white {Text(nearest)}.";
    }

    private static string Reason(LoadingProblem problem, LoadingBox box, LoadingPoint best)
    {
        for (int i = 0; i < 2; i++)
        {
            if (problem.UnitDepthMgPerMl(i) is null)
                return $"{problem.Lot(i).Name} absorbs none of the source light, so it emits next to nothing. Choose a lot that absorbs at the source's peak.";
            if (problem.Lot(i).FilmYieldShare == 0)
                return $"{problem.Lot(i).Name} has a quantum yield of 0 in the film, so it emits nothing. Check quantum_yield and film_yield_factor.";
        }

        // A white within the box of loadings is a mixture of three lights. Outside their triangle no loading helps.
        var probe = problem.OutputAt(Math.Max(best.FirstMgPerMl, box.Unit[0] * 0.1), Math.Max(best.SecondMgPerMl, box.Unit[1] * 0.1));
        if (problem.Corners(probe) is [{ } source, { } first, { } second] && OutsideReason(problem, source, first, second) is { } outside)
            return outside;
        if (BoundReason(problem, box, best) is { } bound)
            return bound;
        return SourceLeft(problem);
    }

    private static string? OutsideReason(LoadingProblem problem, Chromaticity source, Chromaticity first, Chromaticity second)
    {
        // Barycentric shares of the target in the triangle source, first, second: a negative one names the light there is too much of.
        double area = Cross(source, first, second);
        double ofSource = Cross(problem.Wanted, first, second) / area;
        double ofFirst = Cross(source, problem.Wanted, second) / area;
        double ofSecond = Cross(source, first, problem.Wanted) / area;
        string place = problem.Target.Place == TargetPlace.Panel ? "behind the filters" : "above the film";
        string a = problem.Lot(0).Name, b = problem.Lot(1).Name;
        double peakNm = EmissionBands.Of("source", problem.FilmCase.Film.Backlight.Photons).PeakNm ?? 0;
        if (ofSource < 0)
        {
            return $"{place}, {a} ({Text(first)}) and {b} ({Text(second)}) together are already bluer than the target, with no source light at all. "
                + "Choose lots with less blue-green in their emission, or filters that hold it back.";
        }

        if (ofFirst < 0 || ofSecond < 0)
        {
            var (missing, other, otherAt) = ofFirst < 0 ? (a, b, second) : (b, a, first);
            return string.Create(
                CultureInfo.InvariantCulture,
                $"{place}, the source with its peak at {peakNm:0.0} nm ({Text(source)}) and {other} ({Text(otherAt)}) lie so that even without any {missing} the white passes the target on the far side. ")
                + (peakNm > 475
                    ? "The source's peak is long: a shorter one (near 450 nm) opens the way."
                    : $"Choose another lot than {other}, with a peak nearer the colour that is short, or a shorter source.");
        }

        return null;
    }

    private static string? BoundReason(LoadingProblem problem, LoadingBox box, LoadingPoint best)
    {
        var reasons = new List<string>();
        double[] at = [best.FirstMgPerMl, best.SecondMgPerMl];
        for (int i = 0; i < 2; i++)
        {
            string name = problem.Lot(i).Name;
            if (at[i] >= box.Max[i] * (1 - AtBoundShare))
                reasons.Add(string.Create(CultureInfo.InvariantCulture, $"{name} is at its upper bound of {box.Max[i]:0.###} mg/mL; raise it, make the layer thicker, or take a lot that absorbs more."));
            else if (box.Min[i] > 0 && at[i] <= box.Min[i] * (1 + AtBoundShare))
                reasons.Add(string.Create(CultureInfo.InvariantCulture, $"{name} is at its lower bound of {box.Min[i]:0.###} mg/mL; lower it, or make the layer thinner."));
        }

        return reasons.Count > 0 ? string.Join(" ", reasons) : null;
    }

    private static string SourceLeft(LoadingProblem problem)
    {
        double bypass = problem.FilmCase.Film.Cavity.BypassShare;
        string others = problem.FilmCase.Film.Layers.SelectMany(l => l.Dots).Any(d => problem.Target.Free.All(f => f.LotName != d.Lot.Name))
            ? " The lots that are held fixed may already emit too much; free one of them."
            : "";
        return (bypass > 0
            ? string.Create(CultureInfo.InvariantCulture, $"{bypass:P1} of the source misses the film and what is converted cannot make up for that blue, at any loading. Close the gaps (cavity.bypass_share), or raise the lots' yield.")
            : "the mixture of source and emitted light that the target needs is not reached at any loading: dots re-absorb each other's light and lose it as fast as more of them add it. Raise the yields, reduce the overlap of red absorption with green emission, or return more light from above.")
            + others;
    }

    private static double Cross(Chromaticity a, Chromaticity b, Chromaticity c) =>
        ((b.X - a.X) * (c.Y - a.Y)) - ((c.X - a.X) * (b.Y - a.Y));

    private static string Text(Chromaticity c) => string.Create(CultureInfo.InvariantCulture, $"{c.X:0.0000}, {c.Y:0.0000}");
}
