// Reads the contours of the board's DXF back: closed polylines with bulges, and circles, by layer.

export interface ReadVertex {
  readonly xMm: number;
  readonly yMm: number;
  /** Tangent of a quarter of the arc to the next vertex; 0 for a straight side. */
  readonly bulge: number;
}

export interface ReadEntity {
  readonly kind: 'polyline' | 'circle';
  readonly layer: string;
  readonly closed: boolean;
  readonly vertices: readonly ReadVertex[];
  /** Of a circle [mm]. */
  readonly radiusMm: number;
}

export interface ReadDxf {
  readonly units: string;
  readonly entities: readonly ReadEntity[];
}

interface Draft {
  kind: 'polyline' | 'circle' | null;
  layer: string;
  closed: boolean;
  vertices: { xMm: number; yMm: number; bulge: number }[];
  radiusMm: number;
}

export function readDxf(text: string): ReadDxf {
  const lines = text.split(/\r?\n/);
  const entities: ReadEntity[] = [];
  let units = '';
  let variable = '';
  let inEntities = false;
  let draft: Draft = { kind: null, layer: '', closed: false, vertices: [], radiusMm: 0 };
  const finish = (): void => {
    if (draft.kind !== null) entities.push({ ...draft, kind: draft.kind });
    draft = { kind: null, layer: '', closed: false, vertices: [], radiusMm: 0 };
  };
  for (let i = 0; i + 1 < lines.length; i += 2) {
    const code = Number(lines[i]!.trim());
    const value = lines[i + 1]!.trim();
    if (code === 9) variable = value;
    if (variable === '$INSUNITS' && code === 70) {
      units = value;
      variable = '';
    }
    if (code === 2 && value === 'ENTITIES') inEntities = true;
    if (!inEntities) continue;
    if (code === 0) {
      finish();
      if (value === 'ENDSEC') inEntities = false;
      draft.kind = value === 'LWPOLYLINE' ? 'polyline' : value === 'CIRCLE' ? 'circle' : null;
    } else if (code === 8) draft.layer = value;
    else if (code === 70 && draft.kind === 'polyline') draft.closed = (Number(value) & 1) === 1;
    else if (code === 40 && draft.kind === 'circle') draft.radiusMm = Number(value);
    else if (code === 10) draft.vertices.push({ xMm: Number(value), yMm: 0, bulge: 0 });
    else if (code === 20 && draft.vertices.length > 0) draft.vertices[draft.vertices.length - 1]!.yMm = Number(value);
    else if (code === 42 && draft.vertices.length > 0) draft.vertices[draft.vertices.length - 1]!.bulge = Number(value);
  }
  finish();
  return { units, entities };
}
