import { Ellipsis } from "lucide-react";
import { columnLength } from "@/components/stackup/layer-field-text";
import { Badge } from "@/components/ui/badge";
import { Button } from "@/components/ui/button";
import type { DataColumn } from "@/components/ui/data-table";
import { Menu, MenuItem } from "@/components/ui/menu";
import type { LengthUnit } from "@/lib/client/preferences";
import { convert, type Quantity, toSi } from "@/lib/si/units";
import { comparedDk, type MaterialRow } from "./material-rows";

/** What can be done with a row; null where this person only reads. */
export interface MaterialActs {
  edit: (row: MaterialRow) => void;
  copy: (row: MaterialRow) => void;
  remove: (row: MaterialRow) => void;
}

export function materialColumns(unit: LengthUnit, acts: MaterialActs | null): DataColumn<MaterialRow>[] {
  const columns: DataColumn<MaterialRow>[] = [
    {
      id: "name",
      header: "Name",
      width: 230,
      sortValue: ({ material }) => material.name,
      cell: ({ material }) => (
        <span className="font-medium" title={material.name}>
          {material.name}
        </span>
      ),
    },
    {
      id: "whose",
      header: "Whose",
      width: 76,
      sortValue: ({ own }) => (own ? 0 : 1),
      cell: ({ own }) => <Badge tone={own ? "copper" : "plain"}>{own ? "team" : "generic"}</Badge>,
    },
    {
      id: "kind",
      header: "Kind",
      width: 76,
      sortValue: ({ material }) => material.kind,
      cell: ({ material }) => material.kind,
    },
    {
      id: "style",
      header: "Glass",
      width: 60,
      explanation: "Glass style by its IPC-4412 number",
      sortValue: ({ material }) => material.glassStyle || null,
      cell: ({ material }) => material.glassStyle || none,
    },
    {
      id: "resin",
      header: "Resin",
      kind: "number",
      width: 64,
      explanation: "Resin content by weight",
      sortValue: ({ material }) => numberOf(material.resinPercent),
      number: ({ material }) => (material.resinPercent ? { text: material.resinPercent, unit: "%" } : null),
    },
    {
      id: "dk",
      header: "Dk",
      kind: "number",
      width: 56,
      sortValue: ({ material }) => numberOf(material.dk),
      number: ({ material }) => (material.dk ? { text: material.dk } : null),
    },
    {
      id: "df",
      header: "Df",
      kind: "number",
      width: 72,
      sortValue: ({ material }) => numberOf(material.df),
      number: ({ material }) => (material.df ? { text: material.df } : null),
    },
    {
      id: "at",
      header: "At",
      kind: "number",
      width: 72,
      explanation: "The frequency at which Dk and Df hold",
      sortValue: ({ material }) => (material.frequency ? toSi(material.frequency, "frequency") : null),
      number: ({ material }) =>
        material.frequency ? { text: convert(material.frequency, "GHz").value, unit: "GHz" } : null,
    },
    {
      id: "compared",
      header: "Dk, 10 GHz",
      kind: "number",
      width: 88,
      explanation: "Dk carried to 10 GHz, with Df taken as constant (Djordjević and others, 2001)",
      sortValue: ({ material }) => comparedDk(material),
      number: ({ material }) => {
        const dk = comparedDk(material);
        return dk === null ? null : { text: dk.toFixed(2) };
      },
    },
    {
      id: "thickness",
      header: "Thickness",
      kind: "number",
      width: 100,
      explanation: "Laminate and mask as laid, prepreg one ply without copper to fill, foil its base",
      sortValue: ({ material }) => metres(material.thickness),
      number: ({ material }) => (material.thickness ? columnLength(material.thickness, unit) : null),
    },
    {
      id: "roughness",
      header: "Roughness",
      kind: "number",
      width: 88,
      explanation: "Foil: rms of the bonded side",
      sortValue: ({ material }) => metres(material.roughness),
      number: ({ material }) =>
        material.roughness ? { text: convert(material.roughness, "µm").value, unit: "µm" } : null,
    },
    {
      id: "source",
      header: "Source",
      sortValue: ({ material }) => material.source,
      cell: ({ material }) => (
        <span className="text-ink-soft" title={material.source}>
          {material.source}
        </span>
      ),
    },
  ];
  if (acts)
    columns.push({
      id: "acts",
      header: "Acts",
      width: 60,
      cell: (row) => (
        <Menu
          align="end"
          trigger={
            <Button variant="quiet" size="icon" className="-my-1" aria-label={`Acts on ${row.material.name}`}>
              <Ellipsis size={16} aria-hidden="true" />
            </Button>
          }
        >
          {row.own ? <MenuItem onSelect={() => acts.edit(row)}>Edit</MenuItem> : null}
          <MenuItem onSelect={() => acts.copy(row)}>
            {row.own ? "Duplicate" : "Copy into the team’s own"}
          </MenuItem>
          {row.own ? (
            <MenuItem danger onSelect={() => acts.remove(row)}>
              Remove
            </MenuItem>
          ) : null}
        </Menu>
      ),
    });
  return columns;
}

const none = <span className="text-ink-soft">–</span>;

const numberOf = (text: string | null) => (text === null ? null : Number(text));
const metres = (length: Quantity | null) => (length ? toSi(length, "length") : null);
