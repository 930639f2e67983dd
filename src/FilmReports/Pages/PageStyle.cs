namespace FilmReports.Pages;

/// <summary>How pages look: one ground, one ink, hairlines, tabular figures; light, dark and on paper.</summary>
internal static class PageStyle
{
    public const string Css = """

        :root { --ground: #fbfbf8; --ink: #1d2126; --faint: #555a60; --line: rgba(29, 33, 38, 0.12); color-scheme: light dark; }
        @media (prefers-color-scheme: dark) { :root { --ground: #15181c; --ink: #e8e6e0; --faint: #a9a9a4; --line: rgba(232, 230, 224, 0.18); } }
        html { background: var(--ground); color: var(--ink); font: 15px/1.5 Inter, "Segoe UI", "Helvetica Neue", Arial, "DejaVu Sans", sans-serif; }
        body { margin: 0; }
        main { max-width: 1080px; margin: 0 auto; padding: 32px 28px 64px; }
        h1 { font-size: 27px; line-height: 1.2; margin: 0 0 6px; }
        h2 { font-size: 18px; margin: 40px 0 10px; }
        p { max-width: 74ch; margin: 6px 0 12px; }
        p.found { font-size: 18px; }
        p.made, caption { color: var(--faint); }
        table { border-collapse: collapse; margin: 10px 0 26px; font-variant-numeric: tabular-nums; min-width: 44%; }
        caption { text-align: left; padding: 0 0 5px; }
        th, td { text-align: right; padding: 4px 14px 4px 0; border-bottom: 1px solid var(--line); font-weight: 400; vertical-align: top; }
        th:first-child { text-align: left; }
        thead th { color: var(--faint); font-size: 13px; }
        dl { display: grid; grid-template-columns: repeat(auto-fill, minmax(190px, 1fr)); gap: 14px 26px; margin: 18px 0 26px; }
        dt { color: var(--faint); font-size: 13px; }
        dd { margin: 0; font-size: 20px; font-variant-numeric: tabular-nums; }
        figure { margin: 14px 0 26px; max-width: 780px; }
        figure svg { width: 100%; height: auto; display: block; }
        ul { max-width: 82ch; padding-left: 20px; }
        li { margin: 5px 0; }
        @media print {
          :root { --ground: #ffffff; --ink: #1d2126; --faint: #555a60; --line: rgba(29, 33, 38, 0.2); }
          html { font-size: 9.5pt; }
          main { max-width: none; padding: 0; }
          figure, table, dl { break-inside: avoid; }
          figure { max-width: 150mm; }
        }

        """;
}
