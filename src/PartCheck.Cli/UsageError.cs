using System.CommandLine;
using System.CommandLine.Parsing;

namespace PartCheck.Cli;

/// <summary>What a user typed wrong, in one line.</summary>
internal static class UsageError
{
    private const string NoCommand = "Required command was not provided.";

    /// <summary>All errors of a command line as one line; null: there is none.</summary>
    public static string? Of(ParseResult parsed)
    {
        List<string> messages = [.. parsed.Errors.Select(e => OneLine(e.Message)).Distinct(StringComparer.Ordinal)];
        if (messages.Count > 1)
        {
            messages.Remove(NoCommand);
        }

        return messages.Count == 0 ? null : string.Join(" ", messages.Select(Sentence));
    }

    /// <summary>A text without line breaks, tabs and other control characters.</summary>
    public static string OneLine(string text) =>
        string.Join(' ', string.Concat(text.Select(c => char.IsControl(c) ? ' ' : c)).Split(' ', StringSplitOptions.RemoveEmptyEntries));

    /// <summary>Refuses a word that looks like an option: a mistyped option is no board.</summary>
    public static Argument<T> NoOption<T>(Argument<T> argument)
    {
        argument.Validators.Add(result =>
        {
            foreach (Token token in OptionLike(result))
            {
                result.AddError($"There is no option {token.Value}; a file whose name begins with - is written ./{token.Value}.");
            }
        });
        return argument;
    }

    /// <summary>Refuses an option's value that is empty, or looks like an option: a forgotten value does not swallow the next option.</summary>
    public static Option<T> NoOption<T>(Option<T> option)
    {
        option.Validators.Add(result =>
        {
            foreach (Token token in OptionLike(result))
            {
                result.AddError($"{option.Name} needs a value, not {token.Value}; a file whose name begins with - is written ./{token.Value}.");
            }

            if (result.Tokens.Any(t => t.Value.Length == 0))
            {
                result.AddError($"{option.Name} needs a value.");
            }
        });
        return option;
    }

    private static IEnumerable<Token> OptionLike(SymbolResult result) => result.Tokens.Where(t => t.Value.Length > 1 && t.Value[0] == '-');

    private static string Sentence(string message) => message.EndsWith('.') ? message : message + ".";
}
