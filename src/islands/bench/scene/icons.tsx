import type { ReactNode } from 'react';

function Icon({ children }: { children: ReactNode }) {
  return (
    <svg className="icon" viewBox="0 0 20 20" aria-hidden="true">
      {children}
    </svg>
  );
}

export const DropIcon = () => (
  <Icon>
    <path d="M 10 2.5 C 12.8 6 15 8.8 15 12 A 5 5 0 0 1 5 12 C 5 8.8 7.2 6 10 2.5 Z" />
  </Icon>
);
export const UndoIcon = () => (
  <Icon>
    <path d="M 6.5 3.5 L 3 7 L 6.5 10.5 M 3.5 7 H 12 A 4.5 4.5 0 0 1 12 16 H 9" />
  </Icon>
);
export const AgainIcon = () => (
  <Icon>
    <path d="M 15.5 10 A 5.8 5.8 0 1 1 13.6 5.7 L 15.8 7.6 M 16 3.6 V 7.8 H 11.8" />
  </Icon>
);
export const DoneIcon = () => (
  <Icon>
    <path d="M 4 10.5 L 8 14.5 L 16 5.5" />
  </Icon>
);
export const UnderWayIcon = () => (
  <Icon>
    <circle cx="10" cy="10" r="6.5" />
    <path className="icon-filled" d="M 10 3.5 A 6.5 6.5 0 0 1 10 16.5 Z" />
  </Icon>
);
export const OpenIcon = () => (
  <Icon>
    <circle cx="10" cy="10" r="6.5" />
  </Icon>
);
export const WarnIcon = () => (
  <Icon>
    <path d="M 10 3 L 17.8 16.5 H 2.2 Z M 10 8 V 12 M 10 14 V 14.4" />
  </Icon>
);
export const CloseIcon = () => (
  <Icon>
    <path d="M 4.5 4.5 L 15.5 15.5 M 15.5 4.5 L 4.5 15.5" />
  </Icon>
);
export const MoreIcon = () => (
  <Icon>
    <path d="M 5 8 L 10 13 L 15 8" />
  </Icon>
);
