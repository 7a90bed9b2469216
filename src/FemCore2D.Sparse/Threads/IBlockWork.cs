namespace FemCore2D.Sparse;

/// <summary>Work cut into blocks that may run in any order and at the same time.</summary>
internal interface IBlockWork
{
    /// <summary>Does one block.</summary>
    void Run(int block);
}
