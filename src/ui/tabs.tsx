import type { ReactNode } from 'react';
import { Tab, TabList, TabPanel, Tabs as AriaTabs } from 'react-aria-components/Tabs';
import { classNames } from './class-names';

export interface TabItem {
  id: string;
  label: string;
  /** A small count after the label. */
  count?: number;
  /** Drawn only while its tab is chosen. */
  content: ReactNode;
}

export interface TabsProps {
  label: string;
  tabs: readonly TabItem[];
  selected?: string;
  onSelect?: (id: string) => void;
  panelClassName?: string;
}

/** A row of tabs over one panel. Arrow keys move between tabs. */
export function Tabs({ label, tabs, selected, onSelect, panelClassName = 'pt-4' }: TabsProps) {
  return (
    <AriaTabs selectedKey={selected} onSelectionChange={(key) => onSelect?.(String(key))}>
      <TabList aria-label={label} className="flex gap-x-5 overflow-x-auto border-b border-rule">
        {tabs.map((tab) => (
          <Tab
            key={tab.id}
            id={tab.id}
            className={classNames(
              '-mb-px shrink-0 cursor-pointer border-b-2 border-transparent py-1.5 text-graphite hover:text-ink',
              'data-[focus-visible]:outline-offset-[-2px] data-[selected]:border-copper data-[selected]:font-bold data-[selected]:text-ink',
            )}
          >
            {tab.label}
            {tab.count === undefined ? null : <span className="ml-1.5 font-mono text-sm">{tab.count}</span>}
          </Tab>
        ))}
      </TabList>
      {tabs.map((tab) => (
        <TabPanel key={tab.id} id={tab.id} className={panelClassName}>
          {tab.content}
        </TabPanel>
      ))}
    </AriaTabs>
  );
}
