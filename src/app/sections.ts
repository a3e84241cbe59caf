import { useQuery } from '@tanstack/react-query';
import { deskRoutes } from '#contracts/desk';
import type { Me, Section } from '#contracts/session';
import { callRoute } from '../lib/fetch-json';

export interface RailSection {
  section: Section;
  label: string;
  to: string;
  /** How many things wait there for this person. */
  waiting?: number | undefined;
}

const all: readonly RailSection[] = [
  { section: 'desk', label: 'Desk', to: '/' },
  { section: 'briefs', label: 'Briefs', to: '/briefs' },
  { section: 'designs', label: 'Designs', to: '/designs' },
  { section: 'bench', label: 'Bench', to: '/bench' },
  { section: 'catalogue', label: 'Catalogue', to: '/catalogue' },
  { section: 'records', label: 'Records', to: '/records' },
  { section: 'administration', label: 'Administration', to: '/administration' },
];

/** The sections that this person may enter, with what waits on the desk. */
export function useSections(me: Me): RailSection[] {
  const { data: waiting } = useQuery({
    queryKey: ['desk'],
    queryFn: ({ signal }) => callRoute(deskRoutes.readDesk, { signal }),
    select: (desk) => desk.waitsForMe.length,
    refetchInterval: 60_000,
  });
  return all
    .filter(({ section }) => me.mayEnter.includes(section))
    .map((each) => (each.section === 'desk' ? { ...each, waiting } : each));
}
