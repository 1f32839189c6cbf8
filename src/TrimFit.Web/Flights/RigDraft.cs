using System.Collections.Immutable;
using System.Security.Cryptography;
using System.Text;
using TrimFit.Core.Rigging;
using TrimFit.Import;
using TrimFit.Import.Rigs;
using TrimFit.Reporting;

namespace TrimFit.Web.Flights;

/// <summary>The machine's rig file as it stands, with its faults.</summary>
internal sealed record RigDraft
{
    private RigDraft(string name, byte[] bytes, string text)
    {
        (Name, Bytes, Text) = (name, bytes, text);
        Faults = RigForm.Check(name, text, out Rig? rig);
        Rig = rig;
    }

    /// <summary>No machine yet.</summary>
    public static RigDraft None { get; } = FromText("rig.toml", RigForm.Empty);

    /// <summary>File name.</summary>
    public string Name { get; }

    /// <summary>The file.</summary>
    public byte[] Bytes { get; }

    /// <summary>The file as text.</summary>
    public string Text { get; }

    /// <summary>What is wrong with it.</summary>
    public ImmutableArray<RigFault> Faults { get; }

    /// <summary>The machine; null beside a fault.</summary>
    public Rig? Rig { get; }

    /// <summary>Whether nothing was entered yet.</summary>
    public bool IsEmpty => Text == RigForm.Empty;

    /// <summary>Name and hash for results.</summary>
    public SourceFile Source => new(Name, Convert.ToHexStringLower(SHA256.HashData(Bytes)));

    /// <summary>A rig file that was dropped.</summary>
    /// <exception cref="LogFormatException">The bytes are no UTF-8.</exception>
    public static RigDraft FromBytes(string name, byte[] bytes) => new(name, bytes, Uploads.Utf8(name, bytes));

    /// <summary>A rig file that was typed.</summary>
    public static RigDraft FromText(string name, string text) => new(name, Encoding.UTF8.GetBytes(text), text);
}
