namespace Dotcoat;

/// <summary>Hands over a finished result. Nothing becomes visible before all of it exists.</summary>
internal static class Delivery
{
    /// <summary>Files first, so that a folder that cannot be written leaves standard output empty; then one write to it.</summary>
    /// <param name="context">Where to.</param>
    /// <param name="name">Name of the document's file, without ending.</param>
    /// <param name="json">The document.</param>
    /// <param name="text">The tables for the terminal.</param>
    /// <param name="request">How the result is wanted.</param>
    /// <param name="charts">The charts; asked for only where a folder was named.</param>
    public static void Deliver(
        CommandContext context, string name, string json, Func<string> text, DeliveryRequest request, Func<IEnumerable<OutputFile>> charts)
    {
        context.CancellationToken.ThrowIfCancellationRequested();
        if (request.OutputFolder is { } folder)
            OutputFolder.Write(context.PathOf(folder), [new($"{name}.json", json), .. DocumentTables.Of(json), .. charts()], context.CancellationToken);
        context.CancellationToken.ThrowIfCancellationRequested();
        context.Output.Write(request.Json ? json : text());
    }
}
