namespace FemCore2D.Solvers;

/// <content>The fronts at the top of the tree, which all threads do together, phase by phase.</content>
internal sealed unsafe partial class FrontEngine
{
    private readonly TopFront top;

    private sealed class TopFront
    {
        private const int ColumnChunk = 32;
        private readonly FrontEngine engine;
        private readonly Crew.Work clear;
        private readonly Crew.Work addChild;
        private readonly Crew.Work updateBlock;
        private readonly Crew.Work solveBlock;
        private readonly Crew.Work updateTile;
        private int s;
        private int child;
        private int width;
        private int below;
        private int block;
        private int blockWidth;
        private int cornerEnd;
        private int tileRows;
        private double* panel;
        private double* second;
        private double* update;
        private FrontPlace? leader;

        public TopFront(FrontEngine engine)
        {
            this.engine = engine;
            clear = Clear;
            addChild = AddChild;
            updateBlock = UpdateBlock;
            solveBlock = SolveBlock;
            updateTile = UpdateTile;
        }

        public void Factorize(int supernode)
        {
            FrontPlan plan = engine.plan;
            s = supernode;
            leader = engine.places[0];
            width = engine.structure.Width(s);
            below = engine.structure.BelowCount(s);
            panel = engine.Panel(s);
            second = engine.SecondPanel(panel, leader.SecondPanel);
            update = engine.arena.Pointer + plan.UpdateStarts[s];
            Crew crew = engine.crew;
            crew.Run(clear, Chunks(width + below, ColumnChunk));
            for (int i = plan.ChildStarts[s]; i < plan.ChildStarts[s + 1]; i++)
            {
                child = plan.Children[i];
                engine.FindRuns(child, leader.RunEnds);
                crew.Run(addChild, Chunks(engine.structure.BelowCount(child), ColumnChunk));
            }

            int ld = plan.Strides[s];
            for (block = 0; block < width; block += FrontArithmetic.BlockWidth)
            {
                engine.cancellationToken.ThrowIfCancellationRequested();
                blockWidth = Math.Min(FrontArithmetic.BlockWidth, width - block);
                if (block > 0)
                    crew.Run(updateBlock, Chunks(ld - block * engine.doubles, FrontArithmetic.TileRows));
                if (!engine.FactorizeBlock(s, panel, second, ld, block, blockWidth))
                    return;
                cornerEnd = engine.EndOfCorner(block + blockWidth);
                crew.Run(solveBlock, Chunks(ld - cornerEnd, FrontArithmetic.TileRows));
            }

            // A square of tiles; those above the diagonal are empty.
            tileRows = Chunks(plan.UpdateStrides[s], FrontArithmetic.TileRows);
            crew.Run(updateTile, tileRows * Chunks(below, engine.arithmetic.TileColumns));
        }

        private static int Chunks(int count, int size) => (count + size - 1) / size;

        private void Clear(int chunk, int place)
        {
            int from = chunk * ColumnChunk;
            int to = Math.Min(width + below, from + ColumnChunk);
            int panelFrom = Math.Min(from, width);
            int panelTo = Math.Min(to, width);
            engine.Clear(s, panel, update, panelFrom, panelTo, Math.Max(from - width, 0), Math.Max(to - width, 0));
            engine.Scatter(s, panel, panelFrom, panelTo);
        }

        private void AddChild(int chunk, int place)
        {
            int from = chunk * ColumnChunk;
            int to = Math.Min(engine.structure.BelowCount(child), from + ColumnChunk);
            double* source = engine.arena.Pointer + engine.plan.UpdateStarts[child];
            engine.AddChild(s, panel, update, child, source, leader!.RunEnds, from, to);
        }

        private void UpdateBlock(int chunk, int place)
        {
            int ld = engine.plan.Strides[s];
            int from = block * engine.doubles + chunk * FrontArithmetic.TileRows;
            int to = Math.Min(ld, from + FrontArithmetic.TileRows);
            engine.UpdateBlock(panel, second, ld, block, blockWidth, from, to, Scratch(place));
        }

        private void SolveBlock(int chunk, int place)
        {
            int ld = engine.plan.Strides[s];
            int from = cornerEnd + chunk * FrontArithmetic.TileRows;
            int to = Math.Min(ld, from + FrontArithmetic.TileRows);
            engine.SolveBlock(s, panel, second, ld, block, blockWidth, from, to);
        }

        private void UpdateTile(int tile, int place)
        {
            int row = tile % tileRows * FrontArithmetic.TileRows;
            int column = tile / tileRows * engine.arithmetic.TileColumns;
            if ((row + FrontArithmetic.TileRows) / engine.doubles <= column)
                return;
            engine.cancellationToken.ThrowIfCancellationRequested();
            engine.UpdateTile(s, panel, second, update, row, column, Scratch(place));
        }

        private double* Scratch(int place) => engine.places[place].Scratch;
    }
}
