using Spectre.Console;

namespace Dotcoat;

/// <summary>Says on standard error that work goes on, once it has gone on for a second.</summary>
internal static class Progress
{
    private static readonly TimeSpan Patience = TimeSpan.FromSeconds(1), BetweenNews = TimeSpan.FromMilliseconds(250);

    /// <summary>Runs the work and returns its result.</summary>
    /// <param name="context">Where to say it.</param>
    /// <param name="what">What is being done, such as "solving the film".</param>
    /// <param name="work">The work; it has to heed the context's token itself.</param>
    /// <param name="news">What there is to say of it meanwhile.</param>
    public static T While<T>(CommandContext context, string what, Func<T> work, TracingNews? news = null)
    {
        var running = Task.Run(work, context.CancellationToken);
        if (Task.WaitAny([running], Patience) < 0)
            Show(context, what, running, news);
        return running.GetAwaiter().GetResult();
    }

    // Apart, so that quick commands never load the console library.
    private static void Show(CommandContext context, string what, Task running, TracingNews? news)
    {
        var console = AnsiConsole.Create(new AnsiConsoleSettings { Out = new AnsiConsoleOutput(context.Error) });
        console.Status().Start(Markup.Escape($"{what} …"), status =>
        {
            // A console that cannot be overwritten gets the first line and no more.
            while (Task.WaitAny([running], BetweenNews) < 0)
            {
                if (console.Profile.Capabilities.Ansi && news?.ToString() is { Length: > 0 } latest)
                    status.Status(Markup.Escape($"{what}: {latest}"));
            }
        });
    }
}
