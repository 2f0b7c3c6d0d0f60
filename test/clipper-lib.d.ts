// What the tests use of clipper-lib, which ships no types.

declare module 'clipper-lib' {
  interface IntPoint {
    X: number;
    Y: number;
  }
  const lib: {
    Clipper: {
      new (): {
        AddPaths(paths: IntPoint[][], type: number, closed: boolean): void;
        Execute(type: number, solution: IntPoint[][], subjectFill: number, clipFill: number): boolean;
      };
      Area(path: IntPoint[]): number;
    };
    ClipperOffset: new (
      miterLimit: number,
      arcTolerance: number,
    ) => {
      AddPaths(paths: IntPoint[][], join: number, end: number): void;
      Execute(solution: IntPoint[][], delta: number): void;
    };
    PolyType: { ptSubject: number; ptClip: number };
    ClipType: { ctUnion: number; ctDifference: number; ctIntersection: number };
    PolyFillType: { pftNonZero: number };
    JoinType: { jtMiter: number };
    EndType: { etClosedPolygon: number };
  };
  export default lib;
}
