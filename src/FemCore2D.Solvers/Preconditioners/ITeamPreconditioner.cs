using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Solvers;

/// <summary>A preconditioner that can work on several threads, with the same bits as on one.</summary>
internal interface ITeamPreconditioner<T> : IPreconditioner<T>
    where T : unmanaged, INumberBase<T>
{
    /// <summary>Creates an application of the preconditioner for one caller, which allocates nothing when it is used.</summary>
    ITeamApplication<T> CreateApplication();
}

/// <summary>One caller's use of a preconditioner on a team of threads.</summary>
internal unsafe interface ITeamApplication<T>
    where T : unmanaged, INumberBase<T>
{
    /// <summary>Turns a residual into a correction; both are pinned by the caller and may be the same.</summary>
    void Apply(ThreadTeam team, T* residual, T* correction);
}
