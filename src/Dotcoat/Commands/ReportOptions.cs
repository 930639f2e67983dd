using System.CommandLine;
using System.CommandLine.Parsing;
using System.Globalization;
using FilmReports;

namespace Dotcoat.Commands;

/// <summary>--to, --date and --loading-map.</summary>
internal sealed class ReportOptions
{
    private static readonly string[] Names = [.. Enum.GetValues<ReportForm>().Select(NameOf)];

    private readonly Option<ReportForm[]> _to = new("--to")
    {
        Description = $"Which files: any of {string.Join(", ", Names)}, with commas between them. [default: all]",
        HelpName = "FORMS",
        CustomParser = Forms,
        DefaultValueFactory = _ => Enum.GetValues<ReportForm>(),
    };

    private readonly Option<DateOnly?> _date = new("--date")
    {
        Description = "The date that the report bears; without it, none.",
        HelpName = "YYYY-MM-DD",
        CustomParser = result =>
        {
            if (DateOnly.TryParseExact(result.Tokens[0].Value, "yyyy-MM-dd", CultureInfo.InvariantCulture, DateTimeStyles.None, out var date))
                return date;
            result.AddError($"--date {result.Tokens[0].Value}: a date such as 2026-03-31 is expected.");
            return null;
        },
    };

    private readonly Option<bool> _map = new("--loading-map")
    {
        Description = "Adds white error, blue leakage and coverage over the loadings of the two free lots, half to one and a half times those of the file.",
    };

    public void AddTo(Command command)
    {
        command.Options.Add(_map);
        command.Options.Add(_to);
        command.Options.Add(_date);
    }

    public ReportRequest Read(ParseResult parsed) => new(parsed.GetValue(_to)!, parsed.GetValue(_date));

    public bool IsMapAskedIn(ParseResult parsed) => parsed.GetValue(_map);

    private static ReportForm[] Forms(ArgumentResult result)
    {
        var forms = new List<ReportForm>();
        foreach (string name in result.Tokens[0].Value.Split(','))
        {
            if (Array.IndexOf(Names, name.Trim()) is >= 0 and var index)
                forms.Add(Enum.GetValues<ReportForm>()[index]);
            else
                result.AddError($"--to {result.Tokens[0].Value}: '{name.Trim()}' is no form of a report; there are {string.Join(", ", Names)}.");
        }

        return [.. forms.Distinct()];
    }

    private static string NameOf(ReportForm form) => form.ToString().ToLowerInvariant();
}
