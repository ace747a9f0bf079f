import { Toaster as Sonner } from 'sonner';

/** The one place where short news of something done appears. What went wrong stands in the page instead. */
export function Toaster() {
  return (
    <Sonner
      position="bottom-center"
      offset={72}
      mobileOffset={{ bottom: 130 }}
      toastOptions={{
        style: {
          background: 'var(--color-ink)',
          color: 'var(--color-paper)',
          border: 0,
          borderRadius: '3px',
          fontFamily: 'inherit',
          fontSize: '1rem',
        },
      }}
    />
  );
}
