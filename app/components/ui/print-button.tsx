import { Printer } from 'lucide-react';
import { Button } from './button.tsx';

/** Opens the browser's print dialogue; without scripts the browser's own menu does. */
export function PrintButton() {
  return (
    <Button
      type="button"
      variant="secondary"
      icon={<Printer className="size-5" aria-hidden />}
      onClick={() => window.print()}
    >
      Print
    </Button>
  );
}
