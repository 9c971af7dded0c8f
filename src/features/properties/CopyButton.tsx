/** Puts a formula on the clipboard and says so. */
import { QuietButton, TextButton, say } from '../../components/index.ts';

interface CopyButtonProps {
  readonly what: string;
  /** What is copied, for those who hear the button by itself. */
  readonly label: string;
  readonly isQuiet?: boolean;
  readonly children: string;
}

export function CopyButton({ what, label, isQuiet = false, children }: CopyButtonProps) {
  const Button = isQuiet ? QuietButton : TextButton;
  return (
    <Button
      aria-label={label}
      onClick={() => {
        // Without a secure origin there is no clipboard at all.
        const written = (navigator.clipboard as Clipboard | undefined)?.writeText(what);
        (written ?? Promise.reject(new Error('no clipboard'))).then(
          () => say('Copied.'),
          () => say('The browser does not let us copy; select the formula instead.'),
        );
      }}
    >
      {children}
    </Button>
  );
}
