import type { PhotoView } from '#app/features/photos/views.ts';

type Props = { photos: readonly PhotoView[]; large?: boolean };

/** Photos to look at, each leading to its full view. */
export function PhotoStrip({ photos, large = false }: Props) {
  if (photos.length === 0) return null;
  return (
    <ul className={`grid gap-3 ${large ? 'sm:grid-cols-2' : 'grid-cols-2 sm:grid-cols-3 lg:grid-cols-4'}`}>
      {photos.map((photo) => (
        <li key={photo.id}>
          <PhotoFigure photo={photo} large={large} />
        </li>
      ))}
    </ul>
  );
}

export function PhotoFigure({ photo, large = false }: { photo: PhotoView; large?: boolean }) {
  const alt = photo.caption || `${photo.roleName} photo`;
  return (
    <figure>
      <a href={photo.medium} className="block overflow-hidden rounded-lg border border-line bg-raised">
        <img
          src={large ? photo.medium : photo.thumb}
          alt={alt}
          width={photo.width}
          height={photo.height}
          loading="lazy"
          className={large ? 'h-auto w-full' : 'aspect-4/3 w-full object-cover'}
        />
      </a>
      <figcaption className="mt-1 text-sm break-words">
        <span className="font-semibold">{photo.roleName}</span>
        {photo.caption && `: ${photo.caption}`}
      </figcaption>
    </figure>
  );
}
