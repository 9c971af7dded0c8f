/** Where messages appear; screen readers hear them when they have finished what they were saying. */
import { TextButton } from './Button.tsx';
import { useMessages } from './messages.ts';

/** The visible line, under the running head. */
export function MessageLine() {
  const { message, dismiss } = useMessages();
  if (!message) return null;
  const { undo } = message;
  return (
    <div className="border-hair bg-ultramarine-wash border-b px-(--gutter)">
      <div className="max-w-content text-note text-ink mx-auto flex items-center gap-14 py-4">
        <p>{message.text}</p>
        {undo && (
          <TextButton
            onClick={() => {
              undo();
              dismiss();
            }}
          >
            Undo
          </TextButton>
        )}
        <TextButton onClick={dismiss} className="ml-auto">
          Close
        </TextButton>
      </div>
    </div>
  );
}

/** The region that is read out; it stays in the page whatever room is shown. */
export function MessageAnnouncer() {
  const { message } = useMessages();
  return (
    <p role="status" aria-live="polite" className="sr-only">
      {message?.text}
    </p>
  );
}
