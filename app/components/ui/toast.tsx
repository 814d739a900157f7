import { Check, X } from 'lucide-react';
import { useState } from 'react';

export type ToastContent = { tone: 'done' | 'warn'; text: string };

/** A word of what was just done; it stays until it is closed or the next page. */
export function ToastMessage({ toast }: { toast: ToastContent | null }) {
  const [closed, setClosed] = useState<ToastContent | null>(null);
  return (
    <div role="status" className="print:hidden">
      {toast && closed !== toast && (
        <div className="mb-5 flex items-center gap-3 rounded-lg border border-line bg-raised py-1 pr-1 pl-4">
          <Check className="size-5 shrink-0 text-action" aria-hidden />
          <p className="min-w-0 flex-1 break-words">{toast.text}</p>
          <button
            type="button"
            className="tap grid place-items-center rounded-lg"
            onClick={() => setClosed(toast)}
          >
            <X className="size-5" aria-hidden />
            <span className="sr-only">Close this message</span>
          </button>
        </div>
      )}
    </div>
  );
}
