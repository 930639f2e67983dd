using System.CommandLine;
using System.CommandLine.Help;
using System.CommandLine.Invocation;
using System.Reflection;
using Colorimetry;
using Dotcoat.Commands;
using FilmOptics;

namespace Dotcoat;

/// <summary>The program: arguments in, an exit status out. Nothing else here knows what a process is.</summary>
internal static class CommandLine
{
    private const int ColumnsOfATerminal = 80;

    /// <summary>The version without the commit that a build may add to it.</summary>
    public static string Version { get; } =
        typeof(CommandLine).Assembly.GetCustomAttribute<AssemblyInformationalVersionAttribute>()!.InformationalVersion.Split('+')[0];

    /// <summary>Runs one command. Results go to the context's output, everything else to its error.</summary>
    /// <returns>One of <see cref="ExitStatus"/>.</returns>
    public static int Run(IReadOnlyList<string> arguments, CommandContext context)
    {
        var parsed = Root(context).Parse(arguments, new ParserConfiguration { ResponseFileTokenReplacer = null });
        if (parsed.Errors.Count > 0)
        {
            ReportUsage(parsed, context.Error);
            return ExitStatus.BadInput;
        }

        try
        {
            return parsed.Invoke(new InvocationConfiguration
            {
                Output = context.Output,
                Error = context.Error,
                EnableDefaultExceptionHandler = false,
                ProcessTerminationTimeout = null,
            });
        }
        catch (InputException refused)
        {
            foreach (var fault in refused.Faults)
                context.Error.WriteLine(fault);
            return ExitStatus.BadInput;
        }
        catch (Exception failed) when (failed is IOException or UnauthorizedAccessException)
        {
            context.Error.WriteLine($"dotcoat: {failed.Message}");
            return ExitStatus.BadInput;
        }
        catch (NumericalFailureException failed)
        {
            context.Error.WriteLine($"dotcoat: {failed.Message}");
            return ExitStatus.NumericalFailure;
        }
        catch (OperationCanceledException)
        {
            context.Error.WriteLine("dotcoat: interrupted; nothing was written.");
            return ExitStatus.Interrupted;
        }
        catch (Exception unforeseen)
        {
            // No stack trace for the user; whoever mends it runs the same command under a debugger.
            context.Error.WriteLine($"dotcoat: a fault of dotcoat itself ({unforeseen.GetType().Name}): {unforeseen.Message}");
            return ExitStatus.NumericalFailure;
        }
    }

    private static void ReportUsage(ParseResult parsed, TextWriter error)
    {
        if (parsed.CommandResult.Command is RootCommand root && parsed.UnmatchedTokens.Count > 0)
        {
            string known = string.Join(", ", root.Subcommands.Select(c => c.Name));
            error.WriteLine($"dotcoat: '{parsed.UnmatchedTokens[0]}' is no command; there are {known}.");
            return;
        }

        // The parser's list of allowed values comes in several lines.
        foreach (var fault in parsed.Errors)
            error.WriteLine($"dotcoat: {string.Join(' ', fault.Message.Split((char[]?)null, StringSplitOptions.RemoveEmptyEntries))}");
        string command = parsed.CommandResult.Command is RootCommand ? "dotcoat" : $"dotcoat {parsed.CommandResult.Command.Name}";
        error.WriteLine($"{command} --help shows what is allowed.");
    }

    private static RootCommand Root(CommandContext context)
    {
        var root = new RootCommand("Designs display colour-conversion films loaded with quantum dots.")
        {
            SimulateCommand.Create(context),
            FormulateCommand.Create(context),
            CompareCommand.Create(context),
            InspectCommand.Create(context),
            ReportCommand.Create(context),
            ScatterFromHazeCommand.Create(context),
            QuantumYieldCommand.Create(context),
            DotCommand.Create(context),
            StartCommand.Create(context),
            DeskCommand.Create(context),
        };
        foreach (var option in root.Options)
        {
            if (option is HelpOption help)
                help.Action = new HelpThenStatuses((HelpAction)help.Action!);
            else if (option is VersionOption version)
                version.Action = new PrintVersion();
        }

        return root;
    }

    private sealed class HelpThenStatuses(HelpAction help) : SynchronousCommandLineAction
    {
        // "simulate --help" lacks its FILE, and that is no fault.
        public override bool ClearsParseErrors => true;

        public override int Invoke(ParseResult parseResult)
        {
            help.MaxWidth = ColumnsOfATerminal;
            int status = help.Invoke(parseResult);
            parseResult.InvocationConfiguration.Output.Write(ExitStatus.Help);
            return status;
        }
    }

    private sealed class PrintVersion : SynchronousCommandLineAction
    {
        public override bool ClearsParseErrors => true;

        public override int Invoke(ParseResult parseResult)
        {
            parseResult.InvocationConfiguration.Output.WriteLine($"dotcoat {Version}");
            return ExitStatus.Done;
        }
    }
}
