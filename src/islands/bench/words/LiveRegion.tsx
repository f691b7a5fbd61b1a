import { useEffect, useRef, useState } from 'react';
import { createAnnouncer, type Announcer } from './announcer';

/** The bench's polite voice. Returns what says something, and the region that must stand in the page from the start. */
export function useLiveRegion(): [(message: string) => void, React.ReactElement] {
  const [spoken, setSpoken] = useState('');
  const announcer = useRef<Announcer | null>(null);
  useEffect(() => {
    const made = createAnnouncer(setSpoken);
    announcer.current = made;
    return () => {
      made.stop();
      announcer.current = null;
    };
  }, []);
  const [say] = useState(() => (message: string) => announcer.current?.say(message));
  return [
    say,
    <p key="live" className="visually-hidden" role="status" aria-live="polite">
      {spoken}
    </p>,
  ];
}
