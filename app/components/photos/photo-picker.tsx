import type { PhotoView } from '#app/features/photos/views.ts';

type Props = { legend: string; name: string; photos: readonly PhotoView[]; selected: readonly number[] };

/** Photos to choose some from, as large tick boxes. */
export function PhotoPicker({ legend, name, photos, selected }: Props) {
  return (
    <fieldset>
      <legend className="mb-2 font-semibold">{legend}</legend>
      <div className="grid grid-cols-2 gap-3 sm:grid-cols-4">
        {photos.map((photo) => (
          <label
            key={photo.id}
            className="flex flex-col gap-1 rounded-lg border border-line p-2 has-checked:border-action has-checked:bg-action-soft"
          >
            <img
              src={photo.thumb}
              alt={photo.caption || `${photo.roleName} photo`}
              width={photo.width}
              height={photo.height}
              loading="lazy"
              className="aspect-4/3 w-full rounded object-cover"
            />
            <span className="tap flex items-center gap-2 text-sm">
              <input
                type="checkbox"
                name={name}
                value={photo.id}
                defaultChecked={selected.includes(photo.id)}
                className="size-5 shrink-0 accent-action"
              />
              {photo.roleName}
            </span>
          </label>
        ))}
      </div>
    </fieldset>
  );
}
