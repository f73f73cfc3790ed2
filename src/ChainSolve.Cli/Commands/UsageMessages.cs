using System.CommandLine;
using System.CommandLine.Parsing;

namespace ChainSolve.Cli.Commands;

/// <summary>Says in our own words what the parser of the command line did not understand.</summary>
internal static class UsageMessages
{
    /// <summary>One short message, without a full stop; null where all was understood.</summary>
    public static string? Describe(ParseResult parsed)
    {
        var command = parsed.CommandResult.Command;
        if (MisspeltOption(parsed) is { } option)
        {
            return Unmatched(option, command);
        }

        return parsed.UnmatchedTokens.Count > 0 ? Unmatched(parsed.UnmatchedTokens[0], command)
            : parsed.Errors.Count > 0 ? OfErrors(parsed, command)
            : null;
    }

    // The parser takes an unknown option for an argument where one is still free.
    private static string? MisspeltOption(ParseResult parsed) => parsed.Tokens
        .TakeWhile(token => token.Type != TokenType.DoubleDash)
        .FirstOrDefault(token => token.Type == TokenType.Argument && token.Value.StartsWith("--", StringComparison.Ordinal))?.Value;

    private static string OfErrors(ParseResult parsed, Command command)
    {

        foreach (var error in parsed.Errors)
        {
            switch (error.SymbolResult)
            {
                case OptionResult option when option.Tokens.Count > 1:
                    return $"'{option.Option.Name}' is given more than once";
                case OptionResult { Implicit: true } option:
                    return $"'{option.Option.Name}' is missing: chainsolve {command.Name} FILE {option.Option.Name} {option.Option.HelpName}";
                case OptionResult option when option.Option.HelpName is null:
                    return $"'{option.Option.Name}' takes no value";
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
            return $"unknown option '{name}'{Hints.Nearest(name, known)}";
        }

        if (command is RootCommand)
        {
            var known = command.Subcommands.Select(c => c.Name).ToArray();
            var hint = Hints.Nearest(token, known);
            return $"unknown command '{token}'{(hint.Length > 0 ? hint : $"; known: {string.Join(", ", known)}")}";
        }

        return $"'{token}' is one word too many; texts with blanks go in quotes";
    }
}
