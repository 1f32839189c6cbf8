namespace TrimFit.Jobs;

/// <summary>What went with a deleted job.</summary>
/// <param name="Flights">Its flights.</param>
/// <param name="Contents">Logs, rig files, sheets and results that no other job uses.</param>
/// <param name="RoomGivenBack">Whether the file was made smaller and its write-ahead log emptied at once; false while another program uses the book or
/// the disk is full. The next delete does it.</param>
public sealed record DeletedJob(int Flights, int Contents, bool RoomGivenBack);
