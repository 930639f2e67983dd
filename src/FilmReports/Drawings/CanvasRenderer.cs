using SkiaSharp;

namespace FilmReports.Drawings;

/// <summary>Draws on a Skia canvas: today a PNG, later a PDF page.</summary>
internal static class CanvasRenderer
{
    /// <summary>The drawing as a PNG file.</summary>
    /// <param name="drawing">What to draw.</param>
    /// <param name="ground">Colour of the paper, #rrggbb.</param>
    /// <param name="pixelsPerPoint">Resolution.</param>
    public static byte[] Png(Drawing drawing, string ground, double pixelsPerPoint = 2)
    {
        var size = new SKImageInfo((int)Math.Ceiling(drawing.Width * pixelsPerPoint), (int)Math.Ceiling(drawing.Height * pixelsPerPoint), SKColorType.Rgba8888, SKAlphaType.Opaque);
        using var surface = SKSurface.Create(size);
        surface.Canvas.Clear(SKColor.Parse(ground));
        surface.Canvas.Scale((float)pixelsPerPoint);
        Draw(drawing.Marks, surface.Canvas);
        using var image = surface.Snapshot();
        using var data = image.Encode(SKEncodedImageFormat.Png, 100);
        return data.ToArray();
    }

    /// <summary>The marks on any canvas, in points.</summary>
    public static void Draw(IEnumerable<Mark> marks, SKCanvas canvas)
    {
        foreach (var mark in marks)
        {
            switch (mark)
            {
                case Shape shape:
                    using (var path = PathOf(shape.Spots, shape.Closed))
                        FillAndStroke(canvas, path, shape.Fill, shape.FillOpacity, shape.Stroke);
                    break;
                case Disc disc:
                    using (var builder = new SKPathBuilder())
                    {
                        builder.AddCircle((float)disc.Centre.X, (float)disc.Centre.Y, (float)disc.Radius);
                        using var path = builder.Detach();
                        FillAndStroke(canvas, path, disc.Fill, 1, disc.Stroke);
                    }

                    break;
                case Words words:
                    Write(canvas, words);
                    break;
                case Tiles tiles:
                    Fill(canvas, tiles);
                    break;
                case Window window:
                    canvas.Save();
                    using (var outline = PathOf(window.Outline, closed: true))
                        canvas.ClipPath(outline, antialias: true);
                    Draw(window.Marks, canvas);
                    canvas.Restore();
                    break;
                default:
                    throw new NotSupportedException(mark.GetType().Name);
            }
        }
    }

    private static void Fill(SKCanvas canvas, Tiles tiles)
    {
        using var builder = new SKPathBuilder();
        foreach (var box in tiles.Boxes)
            builder.AddRect(new SKRect((float)box.Left, (float)box.Top, (float)box.Right, (float)box.Bottom));
        using var path = builder.Detach();
        // Smoothed edges of neighbours would let the paper shine through.
        using var paint = new SKPaint { Color = Colour(tiles.Fill, 1), IsAntialias = false };
        canvas.DrawPath(path, paint);
    }

    private static SKPath PathOf(IReadOnlyList<Spot> spots, bool closed)
    {
        using var builder = new SKPathBuilder();
        for (int i = 0; i < spots.Count; i++)
        {
            if (i == 0)
                builder.MoveTo((float)spots[i].X, (float)spots[i].Y);
            else
                builder.LineTo((float)spots[i].X, (float)spots[i].Y);
        }

        if (closed)
            builder.Close();
        return builder.Detach();
    }

    private static void FillAndStroke(SKCanvas canvas, SKPath path, string? fill, double fillOpacity, Stroke? stroke)
    {
        if (fill is not null)
        {
            using var paint = new SKPaint { Color = Colour(fill, fillOpacity), IsAntialias = true };
            canvas.DrawPath(path, paint);
        }

        if (stroke is not null)
        {
            using var paint = new SKPaint
            {
                Color = Colour(stroke.Colour, stroke.Opacity),
                IsAntialias = true,
                Style = SKPaintStyle.Stroke,
                StrokeWidth = (float)stroke.Width,
                StrokeJoin = SKStrokeJoin.Round,
            };
            using var dash = stroke.Dash is { } lengths ? SKPathEffect.CreateDash([.. lengths.Select(l => (float)l)], 0) : null;
            paint.PathEffect = dash;
            canvas.DrawPath(path, paint);
        }
    }

    private static void Write(SKCanvas canvas, Words words)
    {
        using var font = InterFont.Of(words.Size, words.Weight);
        InterFont.RequireGlyphs(words.Text, font);
        var align = words.Anchor switch
        {
            TextAnchor.Start => SKTextAlign.Left,
            TextAnchor.Middle => SKTextAlign.Center,
            _ => SKTextAlign.Right,
        };
        canvas.Save();
        canvas.RotateDegrees((float)words.TurnDeg, (float)words.At.X, (float)words.At.Y);
        if (words.Halo is { } halo)
        {
            using var rim = new SKPaint
            {
                Color = Colour(halo, 0.85), IsAntialias = true, Style = SKPaintStyle.Stroke, StrokeWidth = 2.5f, StrokeJoin = SKStrokeJoin.Round,
            };
            // As outlines: stroked text would stand twice in a PDF, once for each search hit.
            float left = (float)words.At.X - (font.MeasureText(words.Text) * (words.Anchor switch { TextAnchor.Start => 0, TextAnchor.Middle => 0.5f, _ => 1 }));
            using var outline = font.GetTextPath(words.Text, new SKPoint(left, (float)words.At.Y));
            canvas.DrawPath(outline, rim);
        }

        using var ink = new SKPaint { Color = Colour(words.Colour, 1), IsAntialias = true };
        canvas.DrawText(words.Text, (float)words.At.X, (float)words.At.Y, align, font, ink);
        canvas.Restore();
    }

    private static SKColor Colour(string hex, double opacity) => SKColor.Parse(hex).WithAlpha((byte)Math.Round(255 * opacity));
}
