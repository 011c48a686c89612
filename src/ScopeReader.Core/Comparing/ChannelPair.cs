using ScopeReader.Captures;

namespace ScopeReader.Comparing;

/// <summary>A channel of the reference and the one that it is compared with, in every capture of either side.</summary>
/// <param name="File">The compared side's first file.</param>
/// <param name="Reference">Shape [captures of the reference].</param>
/// <param name="Compared">Shape [captures of the compared side].</param>
internal sealed record ChannelPair(string File, IReadOnlyList<ChannelMeasurement> Reference, IReadOnlyList<ChannelMeasurement> Compared)
{
    /// <summary>The compared channel's name.</summary>
    public string Channel => Compared[0].Channel.Name;

    /// <summary>Every channel of the reference with its counterpart: that of the same name and segment, or the only one of its kind.</summary>
    /// <param name="reference">The reference.</param>
    /// <param name="compared">The side that is compared.</param>
    /// <param name="alone">Channels of the reference that have no counterpart.</param>
    public static IReadOnlyList<ChannelPair> Of(ComparedSide reference, ComparedSide compared, out IReadOnlyList<Channel> alone)
    {
        var pairs = new List<ChannelPair>();
        var left = new List<Channel>();
        foreach (ChannelMeasurement channel in reference.Captures[0].Channels)
        {
            ChannelMeasurement[] here = Counterparts(reference, channel, reference.Captures[0]), there = Counterparts(compared, channel, reference.Captures[0]);
            if (there.Length == 0)
                left.Add(channel.Channel);
            else
                pairs.Add(new ChannelPair(compared.Name, here, there));
        }
        alone = left;
        return pairs;
    }

    private static ChannelMeasurement[] Counterparts(ComparedSide side, ChannelMeasurement channel, Measurement of) =>
        [.. side.Captures.Select(capture => Counterpart(capture, channel.Channel, of)).OfType<ChannelMeasurement>()];

    private static ChannelMeasurement? Counterpart(Measurement capture, Channel channel, Measurement of)
    {
        ChannelMeasurement[] alike = [.. capture.Channels.Where(c => c.Channel.GetType() == channel.GetType())];
        return Array.Find(alike, c => c.Channel.Name == channel.Name && c.Channel.Segment == channel.Segment)
            ?? (alike.Length == 1 && of.Channels.Count(c => c.Channel.GetType() == channel.GetType()) == 1 ? alike[0] : null);
    }
}
