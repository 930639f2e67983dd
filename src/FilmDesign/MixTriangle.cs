using System.Globalization;
using Colorimetry;
using FilmOptics;

namespace FilmDesign;

/// <summary>White as a mixture of three lights: the source's, the first free lot's and the second's, where the target is judged.</summary>
internal sealed class MixTriangle
{
    private const int LargestShiftNm = 30;

    private readonly LoadingProblem _problem;
    private readonly Chromaticity[] _corners;

    private MixTriangle(LoadingProblem problem, Chromaticity[] corners) => (_problem, _corners) = (problem, corners);

    /// <summary>The triangle at a result; null where a light is missing.</summary>
    public static MixTriangle? Of(LoadingProblem problem, FilmOutput output)
    {
        Chromaticity?[] corners = [.. Lights(problem, output).Select(problem.ChromaticityOf)];
        return corners.All(c => c is not null) ? new(problem, [.. corners.Select(c => c!.Value)]) : null;
    }

    /// <summary>Why a target outside the triangle is out of reach at any loading, and which peak would bring it inside; null inside.</summary>
    public string? OutsideReason()
    {
        double[] shares = Shares(_problem.Wanted, _corners);
        int missing = Array.IndexOf(shares, shares.Min());
        if (shares[missing] >= 0)
            return null;
        int[] sides = [.. Enumerable.Range(0, 3).Where(i => i != missing)];
        string where = _problem.Target.Place == TargetPlace.Panel ? "behind the filters" : "above the film";
        var (from, to) = (_corners[sides[0]], _corners[sides[1]]);
        // The mixture of the two that comes nearest: the foot of the perpendicular on their line.
        double along = (((_problem.Wanted.X - from.X) * (to.X - from.X)) + ((_problem.Wanted.Y - from.Y) * (to.Y - from.Y)))
            / (((to.X - from.X) * (to.X - from.X)) + ((to.Y - from.Y) * (to.Y - from.Y)));
        var foot = new Chromaticity(from.X + (along * (to.X - from.X)), from.Y + (along * (to.Y - from.Y)));
        string direction = Math.Abs(foot.Y - _problem.Wanted.Y) > Math.Abs(foot.X - _problem.Wanted.X)
            ? foot.Y > _problem.Wanted.Y ? "y too high" : "y too low"
            : foot.X > _problem.Wanted.X ? "x too high" : "x too low";
        string found = string.Create(
            CultureInfo.InvariantCulture,
            $"{where}, {Name(sides[0])} ({LoadingLimit.Text(from)}) and {Name(sides[1])} ({LoadingLimit.Text(to)}) mix to {LoadingLimit.Text(foot)} at best, {direction}, and {Name(missing)} only leads further away.");
        string[] ways = [.. sides.Append(missing).Select(Way).OfType<string>()];
        return found + (ways.Length > 0
            ? $" Try {string.Join(", or ", ways)}."
            : " No shift of one peak mends that: choose other lots or filters.");
    }

    /// <summary>Which light of a film is too strong beside what the target takes.</summary>
    public string ShortLight(FilmOutput output)
    {
        double[] wanted = Shares(_problem.Wanted, _corners), found = Shares(_problem.ChromaticityOf(output), _corners);
        int most = Enumerable.Range(0, 3).MaxBy(i => found[i] - wanted[i]), least = Enumerable.Range(0, 3).MinBy(i => found[i] - wanted[i]);
        return most == 0
            ? string.Create(
                CultureInfo.InvariantCulture,
                $"blue cannot be lowered enough: even with {Name(1)} and {Name(2)} unbounded, the best mixture has {100 * output.Budget.Unconverted:0.#} % of the source photons left above, unconverted.")
            : $"even unbounded, {Name(least)} cannot be raised enough beside the light of {Name(most)}: more of it takes as much away as it adds.";
    }

    // Barycentric shares of a colour in the triangle: a negative one names a light that there is too much of even at none.
    private static double[] Shares(Chromaticity colour, Chromaticity[] c)
    {
        double area = Cross(c[0], c[1], c[2]);
        return [Cross(colour, c[1], c[2]) / area, Cross(c[0], colour, c[2]) / area, Cross(c[0], c[1], colour) / area];
    }

    private static double Cross(Chromaticity a, Chromaticity b, Chromaticity c) =>
        ((b.X - a.X) * (c.Y - a.Y)) - ((c.X - a.X) * (b.Y - a.Y));

    private static IEnumerable<Spectrum<PhotonPerNm>> Lights(LoadingProblem problem, FilmOutput output) =>
        Enumerable.Range(0, 2).Select(i => output.ConvertedByLot[problem.FilmCase.Film.IndexOf(problem.Lot(i))]).Prepend(output.Unconverted);

    private static double PeakNm(Spectrum<PhotonPerNm> light) => EmissionBands.Of("", light).PeakNm ?? 0;

    private string Name(int corner) => corner == 0
        ? string.Create(CultureInfo.InvariantCulture, $"the source with its peak at {_problem.SourcePeakNm:0} nm")
        : _problem.Lot(corner - 1).Name;

    // The smallest shift of one light's peak with which the target lies inside.
    private string? Way(int corner)
    {
        var light = corner == 0 ? _problem.FilmCase.Film.Backlight.Photons : _problem.Lot(corner - 1).Emission;
        for (int shift = 1; shift <= LargestShiftNm; shift++)
        {
            foreach (int signed in new[] { -shift, shift })
            {
                if (_problem.ChromaticityOf(Shifted(light, signed)) is not { } moved)
                    continue;
                Chromaticity[] corners = [.. _corners.Select((c, i) => i == corner ? moved : c)];
                // The triangle must keep its sense: a peak that crosses another's is another film.
                if (Cross(corners[0], corners[1], corners[2]) * Cross(_corners[0], _corners[1], _corners[2]) <= 0 || Shares(_problem.Wanted, corners).Min() < 0)
                    continue;
                string what = corner == 0 ? "a source" : $"a lot in place of {Name(corner)}";
                return string.Create(
                    CultureInfo.InvariantCulture, $"{what} with its peak near {PeakNm(light) + signed:0} nm ({PeakNm(light):0} nm now)");
            }
        }

        return null;
    }

    private static Spectrum<PhotonPerNm> Shifted(Spectrum<PhotonPerNm> light, int shiftNm)
    {
        var samples = new double[WavelengthGrid.Count];
        for (int i = 0; i < samples.Length; i++)
            samples[i] = i - shiftNm >= 0 && i - shiftNm < samples.Length ? light.Samples[i - shiftNm] : 0;
        return Spectrum.FromSamples<PhotonPerNm>(samples, light.Source);
    }
}
