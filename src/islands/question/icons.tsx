import type { ReactNode } from 'react';

const Icon = ({ children }: { children: ReactNode }) => (
  <svg className="icon" viewBox="0 0 20 20" aria-hidden="true">
    {children}
  </svg>
);

export const UpIcon = () => (
  <Icon>
    <path d="M 5 12 L 10 7 L 15 12" />
  </Icon>
);
export const DownIcon = () => (
  <Icon>
    <path d="M 5 8 L 10 13 L 15 8" />
  </Icon>
);
export const GripIcon = () => (
  <Icon>
    <path d="M 4 7 H 16 M 4 13 H 16" />
  </Icon>
);
/** 'good to know': what a second look is for. */
export const NoteIcon = () => (
  <Icon>
    <circle cx="10" cy="10" r="7" />
    <path d="M 10 9 V 14 M 10 6 V 6.4" />
  </Icon>
);
