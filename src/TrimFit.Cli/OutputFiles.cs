using System.Text;

namespace TrimFit.Cli;

/// <summary>Everything the program writes into files: UTF-8 without a mark, whole or not at all.</summary>
internal static class OutputFiles
{
    /// <exception cref="CommandLineException">The file cannot be written.</exception>
    public static void Write(string option, string path, string text) => Write(option, path, Encoding.UTF8.GetBytes(text));

    /// <exception cref="CommandLineException">The file cannot be written.</exception>
    public static void Write(string option, string path, byte[] bytes) => Write(option, path, stream => stream.Write(bytes));

    /// <exception cref="CommandLineException">The file cannot be written.</exception>
    public static void Write(string option, string path, Action<Stream> write)
    {
        try
        {
            string part = path + ".part"; // a full disk must not leave half a result under the wanted name
            using (FileStream stream = File.Create(part))
                write(stream);
            File.Move(part, path, overwrite: true);
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException or ArgumentException or NotSupportedException)
        {
            throw new CommandLineException($"{option}: \"{path}\" cannot be written. Check the folder and its rights.");
        }
    }

    /// <summary>Makes a folder.</summary>
    /// <exception cref="CommandLineException">The folder cannot be made.</exception>
    public static void MakeFolder(string option, string path)
    {
        try
        {
            Directory.CreateDirectory(path);
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException or ArgumentException or NotSupportedException)
        {
            throw new CommandLineException($"{option}: the folder \"{path}\" cannot be made. Check its name and rights.");
        }
    }

    /// <summary>Writes one result in every form that was asked for; the summary goes to standard output unless JSON does.</summary>
    public static void Deliver(CommonChoices choices, TextWriter output, Func<string> summary, Func<string> json, Func<string> page, Func<string> markdown)
    {
        foreach (string path in choices.Reports)
            Write("--report", path, Path.GetExtension(path).Equals(".md", StringComparison.OrdinalIgnoreCase) ? markdown() : page());
        if (choices.Json is string file && file != "-")
            Write("--json", file, json());
        output.Write(choices.Json == "-" ? json() : summary());
    }
}
