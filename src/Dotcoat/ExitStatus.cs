namespace Dotcoat;

/// <summary>What the process tells the shell.</summary>
internal static class ExitStatus
{
    public const int Done = 0;
    public const int TargetNotMet = 1;
    public const int BadInput = 2;
    public const int NumericalFailure = 3;
    public const int Interrupted = 130;

    /// <summary>The lines that every --help ends with.</summary>
    public const string Help = """
        Exit status:
          0    done
          1    done, but a target or a limit is not met; results are printed anyway
          2    bad input or usage; nothing on standard output
          3    a numerical failure, or a fault of dotcoat itself
          130  interrupted

        """;
}
