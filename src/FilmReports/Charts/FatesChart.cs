using System.Globalization;
using FilmOptics;
using FilmReports.Drawings;

namespace FilmReports.Charts;

/// <summary>Where every source photon goes: one photon in on the left, light out on the right, losses downward; widths add up.</summary>
internal static class FatesChart
{
    /// <summary>Losses below this share are drawn together.</summary>
    internal const double PooledShare = 0.005;

    private const double LossLabelRoom = 120, FullWidth = 190, FirstTop = 60, Gap = 14, MinPitch = 26, Left = 40, LeastRight = 470, NameRoom = 134;

    /// <summary>A stream of the picture.</summary>
    /// <param name="Name">What becomes of the photons.</param>
    /// <param name="Share">Per source photon.</param>
    /// <param name="Colour">#rrggbb.</param>
    /// <param name="LeavesAbove">Light out, or a loss.</param>
    /// <param name="Mark">Sign of the light; null for a loss.</param>
    internal sealed record Stream(string Name, double Share, string Colour, bool LeavesAbove, LightMark? Mark);

    private sealed record LossPlace(Stream Stream, double X, double Width, string[] Lines);

    public static Drawing Of(FilmCase filmCase, FilmAppraisal appraisal, Palette palette)
    {
        var streams = Streams(filmCase, appraisal, palette);
        Stream[] outputs = [.. streams.Where(s => s.LeavesAbove)], losses = [.. streams.Where(s => !s.LeavesAbove)];
        double total = streams.Sum(s => s.Share);
        double Width(Stream stream) => stream.Share / total * FullWidth;
        // Outputs fan upward from the lowest, which stays level, so that the losses below have the room to themselves.
        double lift = outputs.Take(outputs.Length - 1).Sum(s => Math.Max(Width(s), MinPitch) - Width(s) + Gap);
        double top = FirstTop + lift;
        var places = PlacesOf(losses, Width);
        // Light leaves to the right of where the last loss has turned down: no stream runs into its name.
        double right = places.Aggregate(LeastRight, (most, place) => Math.Max(most, place.X + place.Width + 8)), pictureWidth = right + 26 + NameRoom + 10;
        var marks = new List<Mark>
        {
            new Words("Where each source photon goes", new(Left, 26), TextAnchor.Start, 13, TextWeight.SemiBold, palette.Ink),
            new Words(string.Create(CultureInfo.InvariantCulture, $"sum of all shares {appraisal.Output.Budget.Sum:0.000000}"), new(pictureWidth - 40, 26), TextAnchor.End, 9.5, TextWeight.Regular, palette.Faint),
            new Words("1 source photon", new(Left, top + FullWidth + 16), TextAnchor.Start, 10, TextWeight.Regular, palette.Ink),
        };
        double y = top, outY = FirstTop;
        foreach (var stream in outputs)
        {
            double width = Width(stream);
            marks.Add(Ribbon(y, outY, width, right, stream.Colour));
            var label = new Spot(right + 26, outY + Math.Max(width / 2, 4));
            if (stream.Mark is { } mark)
                marks.Add(LightMarks.Sign(mark, new(right + 12, label.Y), 4, stream.Colour));
            marks.Add(new Words(InterFont.Fitted(stream.Name, 10, TextWeight.SemiBold, NameRoom), new(label.X, label.Y - 1), TextAnchor.Start, 10, TextWeight.SemiBold, palette.Ink));
            marks.Add(new Words(Percent(stream.Share), new(label.X, label.Y + 11), TextAnchor.Start, 9.5, TextWeight.Regular, palette.Ink));
            y += width;
            outY += Math.Max(width, MinPitch) + Gap;
        }

        // Losses bend downward, the lowest first so that no two cross.
        double bottom = Math.Max(top + FullWidth, outY - Gap) + 46;
        double lossBottom = top + FullWidth;
        foreach (var place in places)
        {
            lossBottom -= place.Width;
            marks.Add(Downward(lossBottom, place.X, place.Width, bottom, place.Stream.Colour, palette.Ground));
            double labelX = place.X + (place.Width / 2);
            for (int line = 0; line < place.Lines.Length; line++)
                marks.Add(new Words(place.Lines[line], new(labelX, bottom + 16 + (line * 11)), TextAnchor.Middle, 9, TextWeight.Regular, palette.Ink));
            marks.Add(new Words(
                Percent(place.Stream.Share), new(labelX, bottom + 16 + (place.Lines.Length * 11)), TextAnchor.Middle, 9.5, TextWeight.SemiBold, palette.Ink));
        }

        marks.Insert(3, new Shape([new(Left - 14, top), new(Left, top), new(Left, top + FullWidth), new(Left - 14, top + FullWidth), new(Left - 6, top + (FullWidth / 2))], Closed: true, palette.Source, 0.9, null));
        return new Drawing(
            "photon-fates",
            "Where each source photon goes",
            string.Join(' ', streams.Select(s => $"{s.Name.Replace('|', ' ')}: {Percent(s.Share)}.")),
            pictureWidth,
            bottom + 62,
            marks);
    }

    /// <summary>The streams: light out by emitter, then losses, with those below 0.5 % pooled, never dropped.</summary>
    internal static IReadOnlyList<Stream> Streams(FilmCase filmCase, FilmAppraisal appraisal, Palette palette)
    {
        var budget = appraisal.Output.Budget;
        var streams = new List<Stream> { new("unconverted", budget.Unconverted, palette.Source, true, LightMark.Triangle) };
        for (int i = 0; i < filmCase.Film.Lots.Count; i++)
        {
            var light = appraisal.Output.ConvertedByLot[i];
            if (light.Integral <= 0)
                continue;
            var (colour, _, mark) = palette.OfEmitter(LightMarks.PeakNm(filmCase.Film.Lots[i].Emission));
            streams.Add(new(ChartNames.OfLot(filmCase.Film, i), light.Integral, colour, true, mark));
        }

        var losses = new List<Stream>
        {
            Loss("lost below", budget.LostBelow),
            Loss("lost above", budget.LostAbove),
            Loss("lost in host", budget.LostInHost),
            Loss("lost at edges", budget.LostAtEdges),
        };
        losses.AddRange(filmCase.Film.Lots.Select((_, i) => Loss($"lost in|{ChartNames.OfLot(filmCase.Film, i)}", budget.LostInLots[i])));
        streams.AddRange(losses.Where(l => l.Share >= PooledShare));
        double pooled = losses.Where(l => l.Share < PooledShare).Sum(l => l.Share);
        if (pooled > 0)
            streams.Add(Loss("other losses", pooled));
        return streams;

        Stream Loss(string name, double share) => new(name, share, palette.Faint, false, null);
    }

    // Where each loss turns down, far enough apart for their names.
    private static List<LossPlace> PlacesOf(Stream[] losses, Func<Stream, double> widthOf)
    {
        var places = new List<LossPlace>();
        double x = Left + 104, labelEnd = 0;
        foreach (var loss in losses)
        {
            double width = widthOf(loss);
            string[] lines = [.. loss.Name.Split('|').Select(line => InterFont.Fitted(line, 9, TextWeight.Regular, LossLabelRoom))];
            double labelWidth = lines.Max(line => InterFont.WidthOf(line, 9, TextWeight.Regular));
            x = Math.Max(x, labelEnd + 10 + ((labelWidth - width) / 2));
            places.Add(new(loss, x, width, lines));
            labelEnd = x + ((width + labelWidth) / 2);
            x += width + 22;
        }

        return places;
    }

    private static Shape Ribbon(double fromY, double toY, double width, double right, string colour)
    {
        const int Steps = 24;
        var upper = new List<Spot>();
        var lower = new List<Spot>();
        for (int i = 0; i <= Steps; i++)
        {
            double t = i / (double)Steps, ease = t * t * (3 - (2 * t));
            double x = Left + (t * (right - Left)), y = fromY + ((toY - fromY) * ease);
            upper.Add(new(x, y));
            lower.Add(new(x, y + width));
        }

        lower.Reverse();
        return new Shape([.. upper, .. lower], Closed: true, colour, 0.45, null);
    }

    // A quarter turn: along the stream, then down, ending in an arrow's width of its own share.
    private static Shape Downward(double fromY, double toX, double width, double bottom, string colour, string ground)
    {
        const int Steps = 14;
        double radius = 16;
        var outer = new List<Spot> { new(Left, fromY) };
        var inner = new List<Spot> { new(Left, fromY + width) };
        for (int i = 0; i <= Steps; i++)
        {
            double angle = i * Math.PI / 2 / Steps;
            outer.Add(new(toX - radius + ((radius + width) * Math.Sin(angle)), fromY + radius + width - ((radius + width) * Math.Cos(angle))));
            inner.Add(new(toX - radius + (radius * Math.Sin(angle)), fromY + radius + width - (radius * Math.Cos(angle))));
        }

        outer.Add(new(toX + width, bottom));
        inner.Add(new(toX, bottom));
        inner.Reverse();
        return new Shape([.. outer, .. inner], Closed: true, colour, 0.3, new Stroke(ground, Math.Min(0.8, width * 0.4)));
    }

    private static string Percent(double share) => string.Create(CultureInfo.InvariantCulture, $"{share * 100:0.0}\u2009%");
}
