// The part of dxf-writer that its own types leave out: the counter behind its object handles.

declare module 'dxf-writer/src/Handle.js' {
  const handle: { seed: number };
  export default handle;
}
