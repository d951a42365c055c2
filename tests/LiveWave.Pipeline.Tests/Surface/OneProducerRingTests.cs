using FsCheck.Xunit;

namespace LiveWave.Pipeline.Tests;

public sealed class OneProducerRingTests
{
    [Property(Replay = "2026,1201", MaxTest = 300)]
    public bool A_ring_behaves_like_a_queue_that_refuses_what_does_not_fit(bool[] offers)
    {
        var ring = new OneProducerRing<int>(8);
        var queue = new Queue<int>();
        var refused = 0;
        for (var i = 0; i < offers.Length; i++)
        {
            if (offers[i])
            {
                if (queue.Count < ring.Capacity) queue.Enqueue(i);
                else refused++;
                _ = ring.Offer(i);
            }
            else if (ring.TryTake(out var value) != queue.TryDequeue(out var wanted) || value != wanted)
            {
                return false;
            }
        }

        return ring.Count == queue.Count && ring.Refused == refused;
    }

    [Fact]
    public void Everything_arrives_once_and_in_order_between_two_threads()
    {
        const int Count = 200_000;
        var ring = new OneProducerRing<int>(64);
        var writer = new Thread(() =>
        {
            for (var i = 0; i < Count; i++)
            {
                while (!ring.Offer(i)) Thread.Yield();
            }
        });

        writer.Start();
        var inOrder = true;
        for (var i = 0; i < Count; i++)
        {
            int value;
            while (!ring.TryTake(out value)) Thread.Yield();
            inOrder &= value == i;
        }

        writer.Join();
        Assert.True(inOrder);
    }
}
