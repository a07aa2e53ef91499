"use client";

import type { Route } from "next";
import Link from "next/link";
import { usePathname, useSearchParams } from "next/navigation";
import { useEffect, useRef } from "react";
import { cn } from "@/components/ui/class-names";
import { REVISION_PARAM } from "@/lib/client/revision-param";
import { type Place, projectOf, projectPlaces, PROJECTS, teamPlaces } from "./places";

/** Where one can go: a rail at the left where there is room, a strip under the header where there is not. */
export function Rail({ mayReadAudit }: { mayReadAudit: boolean }) {
  const pathname = usePathname();
  const projectId = projectOf(pathname);
  const revision = useSearchParams().get(REVISION_PARAM);
  const strip = useRef<HTMLElement>(null);
  // Where the strip is narrower than its places, the one that one is at stands in the middle.
  useEffect(() => {
    const nav = strip.current;
    const current = nav?.querySelector("[aria-current=page]")?.getBoundingClientRect();
    if (!nav || !current) return;
    const middle = nav.getBoundingClientRect().left + nav.clientWidth / 2;
    nav.scrollLeft += current.left + current.width / 2 - middle;
  }, [pathname]);
  return (
    <nav
      ref={strip}
      aria-label="Places"
      className="border-rule-line flex shrink-0 gap-1 overflow-x-auto border-b px-2 py-1 lg:sticky lg:top-12 lg:h-[calc(100dvh-3rem)] lg:w-48 lg:flex-col lg:overflow-y-auto lg:border-r lg:border-b-0 lg:px-3 lg:py-4 print:hidden"
    >
      <RailLink place={PROJECTS} current={pathname === PROJECTS.href} />
      {projectId ? (
        <div className="lg:border-rule-line flex gap-1 lg:mb-2 lg:ml-2 lg:flex-col lg:border-l lg:pl-2">
          {projectPlaces(projectId).map((place) => (
            <RailLink
              key={place.href}
              place={place}
              search={revision ? `?${REVISION_PARAM}=${encodeURIComponent(revision)}` : ""}
              current={isWithin(pathname, place.href)}
            />
          ))}
        </div>
      ) : null}
      {teamPlaces(mayReadAudit).map((place) => (
        <RailLink key={place.href} place={place} current={isWithin(pathname, place.href)} />
      ))}
    </nav>
  );
}

function RailLink({ place, current, search = "" }: { place: Place; current: boolean; search?: string }) {
  const Icon = place.icon;
  return (
    <Link
      href={`${place.href}${search}` as Route}
      aria-current={current ? "page" : undefined}
      className={cn(
        "flex h-8 shrink-0 items-center gap-2 rounded px-2 text-sm -outline-offset-2",
        current ? "bg-rule-line/60 text-ink font-medium" : "text-ink-soft hover:text-ink",
      )}
    >
      <Icon size={15} aria-hidden="true" className={current ? "text-copper" : undefined} />
      {place.label}
    </Link>
  );
}

function isWithin(pathname: string, href: string): boolean {
  return pathname === href || pathname.startsWith(`${href}/`);
}
