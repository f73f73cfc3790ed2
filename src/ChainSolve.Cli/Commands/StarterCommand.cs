using System.CommandLine;
using ChainSolve.Cli.Terminal;

namespace ChainSolve.Cli.Commands;

/// <summary><c>chainsolve starter NAME</c>: writes a first model with comments.</summary>
internal static class StarterCommand
{
    private const string Resource = "first.chain";

    public static Command Build(ProcessStreams streams)
    {
        var name = new Argument<string>("NAME") { Description = "The file to write, .chain is added where it is missing; - writes standard output." };
        var command = new Command("starter", "Writes a first model with comments, to be changed.") { name };
        command.SetAction((parsed, _) =>
        {
            Write(parsed.GetRequiredValue(name), streams);
            return Task.FromResult(ExitCodes.Done);
        });
        return command;
    }

    /// <summary>The text of the first model.</summary>
    public static string Text()
    {
        using var stream = typeof(StarterCommand).Assembly.GetManifestResourceStream(Resource)!;
        using var reader = new StreamReader(stream);
        return reader.ReadToEnd();
    }

    private static void Write(string name, ProcessStreams streams)
    {
        if (name == "-")
        {
            new AnswerSink(streams, null).Write(writer => writer.Write(Text()));
            return;
        }

        var path = name.EndsWith(".chain", StringComparison.Ordinal) ? name : name + ".chain";
        if (File.Exists(path) || Directory.Exists(path))
        {
            throw new FileProblemException($"'{path}' is there already; choose another name");
        }

        AtomicFile.Write(path, writer => writer.Write(Text()));
        streams.Error.WriteLine($"wrote {path}; next: chainsolve solve {path}");
    }
}
