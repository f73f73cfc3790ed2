using System.CommandLine;
using System.CommandLine.Parsing;

namespace ChainSolve.Cli.Commands;

/// <summary>Says in our own words what the parser of the command line did not understand.</summary>
internal static class UsageMessages
{
    /// <summary>One short message, without a full stop.</summary>
    public static string Describe(ParseResult parsed)
    {
        var command = parsed.CommandResult.Command;
        if (parsed.UnmatchedTokens.Count > 0)
        {
            return Unmatched(parsed.UnmatchedTokens[0], command);
        }

        foreach (var error in parsed.Errors)
        {
            switch (error.SymbolResult)
            {
                case OptionResult option when option.Tokens.Count > 1:
                    return $"'{option.Option.Name}' is given more than once";
                case OptionResult option:
                    return $"'{option.Option.Name}' needs a value: {option.Option.Name} {option.Option.HelpName}";
                case ArgumentResult argument:
                    return $"{argument.Argument.Name} is missing: chainsolve {command.Name} {argument.Argument.Name}";
                default:
                    break;
            }
        }

        if (command is RootCommand)
        {
            return $"name a command: {string.Join(", ", command.Subcommands.Select(c => c.Name))}";
        }

        var missing = command.Arguments.FirstOrDefault();
        return missing is null ? parsed.Errors[0].Message.TrimEnd('.') : $"{missing.Name} is missing: chainsolve {command.Name} {missing.Name}";
    }

    private static string Unmatched(string token, Command command)
    {
        if (token.StartsWith('-') && token.Length > 1)
        {
            var name = token.Split('=', 2)[0];
            var known = command.Options.Select(o => o.Name).ToArray();
            return $"unknown option '{name}'{Suggestions.Hint(name, known)}";
        }

        if (command is RootCommand)
        {
            var known = command.Subcommands.Select(c => c.Name).ToArray();
            var hint = Suggestions.Hint(token, known);
            return $"unknown command '{token}'{(hint.Length > 0 ? hint : $"; known: {string.Join(", ", known)}")}";
        }

        return $"'{token}' is one word too many; texts with blanks go in quotes";
    }
}
