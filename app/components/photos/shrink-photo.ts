const LONGEST_SIDE = 2560;
const SMALL_ENOUGH_BYTES = 1_500_000;
const QUALITY = 0.9;

/**
 * A photo scaled down in the browser before it is sent, upright, so that a slow line carries less. What the browser
 * cannot read, and what is small enough, is sent as it is.
 */
export async function shrinkPhoto(file: File): Promise<File> {
  if (file.size <= SMALL_ENOUGH_BYTES || !/^image\/(jpeg|png|webp)$/.test(file.type)) return file;
  const picture = await createImageBitmap(file, { imageOrientation: 'from-image' }).catch(() => null);
  if (!picture) return file;
  const scale = Math.min(1, LONGEST_SIDE / Math.max(picture.width, picture.height));
  if (scale === 1) return file;
  const canvas = document.createElement('canvas');
  canvas.width = Math.round(picture.width * scale);
  canvas.height = Math.round(picture.height * scale);
  canvas.getContext('2d')?.drawImage(picture, 0, 0, canvas.width, canvas.height);
  picture.close();
  const blob = await new Promise<Blob | null>((resolve) => canvas.toBlob(resolve, 'image/jpeg', QUALITY));
  if (!blob || blob.size >= file.size) return file;
  return new File([blob], file.name.replace(/\.\w+$/, '.jpg'), {
    type: 'image/jpeg',
    lastModified: file.lastModified,
  });
}
