/** The glass that fabric is woven of. */
export interface GlassKind {
  id: "e-glass" | "low-dk-glass";
  name: string;
  /** [kg/m³] */
  density: number;
  /** relative permittivity and loss tangent, taken as constant from 1 to 20 GHz [1] */
  er: number;
  tanD: number;
  source: string;
}

export const glassKinds: Record<GlassKind["id"], GlassKind> = {
  "e-glass": {
    id: "e-glass",
    name: "E-glass",
    density: 2540,
    er: 6.3,
    tanD: 0.005,
    source: "from memory; E-glass is given with Dk 6.1 to 6.6",
  },
  "low-dk-glass": {
    id: "low-dk-glass",
    name: "Low-Dk glass",
    density: 2300,
    er: 4.6,
    tanD: 0.002,
    source: "from memory; low-Dk glass is given with Dk 4.4 to 4.8",
  },
};
