namespace FilmOptics;

/// <summary>A single value as a film file writes it.</summary>
/// <param name="Key">Its key as --set takes it: list items by name where they have one, otherwise by index.</param>
/// <param name="Text">What is written, without quotes.</param>
/// <param name="Line">Line, from 1.</param>
/// <param name="Column">Column, from 1.</param>
public sealed record WrittenValue(string Key, string Text, int Line, int Column);
