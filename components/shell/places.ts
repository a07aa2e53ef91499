import {
  Activity,
  ClipboardCheck,
  FolderKanban,
  Layers,
  LayoutDashboard,
  Library,
  ListChecks,
  type LucideIcon,
  PackageCheck,
  Ruler,
  Scale,
  ScrollText,
  Shapes,
  Spline,
  Users,
} from "lucide-react";

export interface Place {
  label: string;
  href: string;
  icon: LucideIcon;
}

/** Where one chooses what to work on. */
export const PROJECTS: Place = { label: "Projects", href: "/projects", icon: FolderKanban };

/** What else there is for a team; a place that would only answer "not found" is left out. */
export function teamPlaces(mayReadAudit: boolean): readonly Place[] {
  return [
    { label: "Materials", href: "/materials", icon: Library },
    { label: "Team", href: "/team", icon: Users },
    ...(mayReadAudit ? [{ label: "Audit", href: "/audit", icon: ScrollText }] : []),
    { label: "Validation", href: "/validation", icon: Scale },
  ];
}

/** The places of a project, in the order in which the job is done. */
export function projectPlaces(projectId: string): readonly Place[] {
  const at = (name: string) => `/projects/${projectId}/${name}`;
  return [
    { label: "Overview", href: at("overview"), icon: LayoutDashboard },
    { label: "Stackup", href: at("stackup"), icon: Layers },
    { label: "Impedance", href: at("impedance"), icon: Ruler },
    { label: "Classes", href: at("classes"), icon: Shapes },
    { label: "Nets", href: at("nets"), icon: Spline },
    { label: "Rules", href: at("rules"), icon: ListChecks },
    { label: "Runs", href: at("runs"), icon: Activity },
    { label: "Review", href: at("review"), icon: ClipboardCheck },
    { label: "Releases", href: at("releases"), icon: PackageCheck },
  ];
}

/** The project that an address is of; the page that makes a new one is of none. */
export function projectOf(pathname: string): string | null {
  const id = /^\/projects\/([^/]+)\//.exec(`${pathname}/`)?.[1];
  return id === undefined || id === "new" ? null : id;
}
