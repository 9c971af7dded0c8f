/** The name of the house, which leads to its front door. */
import { Link } from 'react-router-dom';
import { paths } from '../routes/paths.ts';

export function Mark() {
  return (
    <Link
      to={paths.front}
      className="text-ink text-[21px] leading-none font-semibold tracking-[0.2px] italic no-underline"
    >
      Massieu
    </Link>
  );
}
