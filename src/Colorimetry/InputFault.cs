using System.Globalization;

namespace Colorimetry;

/// <summary>One thing wrong with an input, in words a user can act on.</summary>
/// <param name="File">File (or option) it stands in.</param>
/// <param name="Line">Line, from 1; null where there is none.</param>
/// <param name="Column">Column, from 1; null where there is none.</param>
/// <param name="Message">What was found and what is allowed.</param>
public sealed record InputFault(string File, int? Line, int? Column, string Message)
{
    /// <summary>file:line:column: message.</summary>
    public override string ToString()
    {
        string line = Line is { } l ? string.Create(CultureInfo.InvariantCulture, $":{l}") : "";
        string column = Column is { } c ? string.Create(CultureInfo.InvariantCulture, $":{c}") : "";
        return $"{File}{line}{column}: {Message}";
    }
}

/// <summary>An input was refused. Carries every fault found, not just the first.</summary>
public sealed class InputException : Exception
{
    /// <summary>One fault.</summary>
    public InputException(InputFault fault)
        : this([fault])
    {
    }

    /// <summary>Several faults, in the order of the file.</summary>
    /// <param name="faults">At least one.</param>
    public InputException(IReadOnlyList<InputFault> faults)
        : base(string.Join(Environment.NewLine, faults)) => Faults = faults;

    /// <summary>What is wrong.</summary>
    public IReadOnlyList<InputFault> Faults { get; }
}
