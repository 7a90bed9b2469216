namespace FemCore2D.Solvers;

/// <summary>Joins neighbouring vertices of a graph into clusters, which are the vertices of a smaller graph.</summary>
/// <remarks>
/// Heavy-edge clustering in the spirit of G. Karypis and V. Kumar (1998), <em>A fast and high quality multilevel scheme
/// for partitioning irregular graphs</em>; clusters larger than pairs save levels.
/// </remarks>
internal static class GraphCoarsening
{
    private const int BlockSize = 1 << 14;

    /// <summary>Makes the smaller graph.</summary>
    /// <param name="graph">The graph.</param>
    /// <param name="clusterSize">The most vertices that are joined at once.</param>
    /// <param name="largestWeight">No cluster becomes heavier than this by joining.</param>
    /// <param name="clusters">Receives for each vertex its cluster.</param>
    /// <param name="crew">Who does the work, or null for the calling thread.</param>
    public static Graph Coarsen(Graph graph, int clusterSize, int largestWeight, int[] clusters, Crew? crew)
    {
        int count = FormClusters(graph, clusterSize, largestWeight, clusters);
        return Contract(graph, clusters, count, crew);
    }

    private static int FormClusters(Graph graph, int clusterSize, int largestWeight, int[] clusters)
    {
        int n = graph.Count;
        int[] starts = graph.Starts;
        int[] neighbors = graph.Neighbors;
        int[]? edgeWeights = graph.EdgeWeights;
        clusters.AsSpan(0, n).Fill(-1);
        int count = 0;
        for (int v = 0; v < n; v++)
        {
            if (clusters[v] >= 0)
                continue;
            int weight = graph.Weight(v);
            clusters[v] = count;
            int members = 1;
            while (members < clusterSize)
            {
                int best = -1;
                int bestWeight = 0;
                for (int p = starts[v]; p < starts[v + 1]; p++)
                {
                    int u = neighbors[p];
                    if (clusters[u] >= 0)
                        continue;
                    int edge = edgeWeights is null ? 1 : edgeWeights[p];
                    if (edge > bestWeight && weight + graph.Weight(u) <= largestWeight)
                    {
                        best = u;
                        bestWeight = edge;
                        if (edgeWeights is null)
                            break;
                    }
                }

                if (best < 0)
                    break;
                clusters[best] = count;
                weight += graph.Weight(best);
                members++;
            }

            if (members == 1)
            {
                // Nobody is free: joins the lightest bound neighbour, so that few clusters of one remain.
                int best = -1;
                int bestWeight = 0;
                for (int p = starts[v]; p < starts[v + 1]; p++)
                {
                    int edge = edgeWeights is null ? 1 : edgeWeights[p];
                    if (edge > bestWeight)
                    {
                        best = neighbors[p];
                        bestWeight = edge;
                    }
                }

                if (best >= 0 && 4 * weight <= largestWeight)
                {
                    clusters[v] = clusters[best];
                    continue;
                }
            }

            count++;
        }

        return count;
    }

    private static Graph Contract(Graph graph, int[] clusters, int count, Crew? crew)
    {
        int n = graph.Count;
        int[] memberStarts = new int[count + 1];
        for (int v = 0; v < n; v++)
            memberStarts[clusters[v] + 1]++;
        for (int c = 0; c < count; c++)
            memberStarts[c + 1] += memberStarts[c];
        int[] members = GC.AllocateUninitializedArray<int>(n);
        int[] next = memberStarts.AsSpan(0, count).ToArray();
        for (int v = 0; v < n; v++)
            members[next[clusters[v]]++] = v;

        // Each block of clusters writes its edges where they would begin if none were lost; then all close up.
        int blocks = (count + BlockSize - 1) / BlockSize;
        int[] blockStarts = new int[blocks + 1];
        for (int b = 0; b < blocks; b++)
        {
            int edges = 0;
            int to = memberStarts[Math.Min(count, (b + 1) * BlockSize)];
            for (int m = memberStarts[b * BlockSize]; m < to; m++)
                edges += graph.Starts[members[m] + 1] - graph.Starts[members[m]];
            blockStarts[b + 1] = blockStarts[b] + edges;
        }

        int[] starts = new int[count + 1];
        int[] neighbors = GC.AllocateUninitializedArray<int>(blockStarts[blocks]);
        int[] edgeWeights = GC.AllocateUninitializedArray<int>(blockStarts[blocks]);
        int[] vertexWeights = GC.AllocateUninitializedArray<int>(count);
        int[] counts = new int[blocks];
        int[]?[] seenAt = new int[crew?.Size ?? 1][];
        void ContractBlock(int block, int place)
        {
            int[] seen = seenAt[place] ??= new int[count];
            int at = blockStarts[block];
            int end = Math.Min(count, (block + 1) * BlockSize);
            for (int c = block * BlockSize; c < end; c++)
            {
                int first = at;
                int weight = 0;
                for (int m = memberStarts[c]; m < memberStarts[c + 1]; m++)
                {
                    int v = members[m];
                    weight += graph.Weight(v);
                    for (int p = graph.Starts[v]; p < graph.Starts[v + 1]; p++)
                    {
                        int d = clusters[graph.Neighbors[p]];
                        if (d == c)
                            continue;
                        int edge = graph.EdgeWeights is null ? 1 : graph.EdgeWeights[p];

                        // One more than the place, so that zeros and places of earlier clusters mean unseen.
                        int where = seen[d] - 1;
                        if (where >= first && where < at && neighbors[where] == d)
                        {
                            edgeWeights[where] += edge;
                        }
                        else
                        {
                            neighbors[at] = d;
                            edgeWeights[at] = edge;
                            seen[d] = ++at;
                        }
                    }
                }

                vertexWeights[c] = weight;
                starts[c + 1] = at - blockStarts[block];
            }

            counts[block] = at - blockStarts[block];
        }

        if (crew is null)
        {
            for (int b = 0; b < blocks; b++)
                ContractBlock(b, 0);
        }
        else
        {
            crew.Run(ContractBlock, blocks);
        }

        int shift = 0;
        for (int b = 0; b < blocks; b++)
        {
            if (blockStarts[b] != shift)
            {
                Array.Copy(neighbors, blockStarts[b], neighbors, shift, counts[b]);
                Array.Copy(edgeWeights, blockStarts[b], edgeWeights, shift, counts[b]);
            }

            int end = Math.Min(count, (b + 1) * BlockSize);
            for (int c = b * BlockSize; c < end; c++)
                starts[c + 1] += shift;
            shift += counts[b];
        }

        return new Graph(count, starts, neighbors) { VertexWeights = vertexWeights, EdgeWeights = edgeWeights };
    }
}
