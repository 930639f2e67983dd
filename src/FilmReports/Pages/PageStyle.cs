using FilmReports.Drawings;

namespace FilmReports.Pages;

/// <summary>How pages look: one ground, one ink, hairlines, tabular figures; light, dark and on paper.</summary>
internal static class PageStyle
{
    /// <summary>The style sheet. Charts keep their own light ground: their tints and lines are made for it.</summary>
    public static string Css { get; } = $$"""

        :root { color-scheme: light dark; {{Colours(Palette.Light)}} }
        @media (prefers-color-scheme: dark) { :root { {{Colours(Palette.Dark)}} } }
        html { background: var(--ground); color: var(--ink); font: 15px/1.5 Inter, "Segoe UI", "Helvetica Neue", Arial, "DejaVu Sans", sans-serif; }
        body { margin: 0; }
        main { max-width: 960px; margin: 0 auto; padding: 32px 28px 64px; }
        h1 { font-size: 27px; line-height: 1.2; margin: 0 0 6px; }
        h2 { font-size: 18px; margin: 44px 0 10px; }
        p { max-width: 74ch; margin: 6px 0 12px; }
        p.found { font-size: 18px; }
        p.made, caption { color: var(--faint); }
        table { border-collapse: collapse; margin: 10px 0 26px; font-variant-numeric: tabular-nums; min-width: 60%; }
        caption { text-align: left; padding: 0 0 5px; }
        th, td { text-align: right; padding: 4px 0 4px 22px; border-bottom: 1px solid var(--line); font-weight: 400; vertical-align: top; }
        th:first-child { text-align: left; padding-left: 0; }
        table.words th, table.words td { text-align: left; }
        thead th { color: var(--faint); font-size: 13px; vertical-align: bottom; }
        tr.sum th, tr.sum td { font-weight: 600; border-top: 1px solid var(--ink); }
        dl { display: grid; grid-template-columns: repeat(auto-fill, minmax(220px, 1fr)); gap: 14px 26px; margin: 18px 0 26px; }
        dt { color: var(--faint); font-size: 13px; }
        dd { margin: 0; font-size: 20px; font-variant-numeric: tabular-nums; }
        figure { margin: 14px 0 26px; max-width: 780px; }
        figure svg { width: 100%; height: auto; display: block; }
        ul { max-width: 82ch; padding-left: 20px; }
        li { margin: 5px 0; }
        @media print {
          :root { {{Colours(Palette.Light)}} --ground: #ffffff; }
          html { font-size: 9pt; }
          main { max-width: none; padding: 0; }
          h1 { font-size: 16pt; }
          h2 { font-size: 12pt; break-after: avoid; }
          figure, table, dl, li { break-inside: avoid; }
          caption { break-after: avoid; }
          figure { max-width: 150mm; }
        }

        """;

    private static string Colours(Palette palette) => $"--ground: {palette.Ground}; --ink: {palette.Ink}; --faint: {palette.Faint}; --line: {palette.Hairline};";
}
