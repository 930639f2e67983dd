using Spectre.Console;

namespace Dotcoat;

/// <summary>Says on standard error that work goes on, once it has gone on for a second.</summary>
internal static class Progress
{
    private static readonly TimeSpan Patience = TimeSpan.FromSeconds(1);

    /// <summary>Runs the work and returns its result.</summary>
    /// <param name="context">Where to say it.</param>
    /// <param name="what">What is being done, such as "solving the film".</param>
    /// <param name="work">The work; it has to heed the context's token itself.</param>
    public static T While<T>(CommandContext context, string what, Func<T> work)
    {
        var running = Task.Run(work, context.CancellationToken);
        if (Task.WaitAny([running], Patience) < 0)
            Show(context, what, running);
        return running.GetAwaiter().GetResult();
    }

    // Apart, so that quick commands never load the console library.
    private static void Show(CommandContext context, string what, Task running)
    {
        var console = AnsiConsole.Create(new AnsiConsoleSettings { Out = new AnsiConsoleOutput(context.Error) });
        console.Status().Start(Markup.Escape($"{what} …"), _ => Task.WaitAny([running]));
    }
}
