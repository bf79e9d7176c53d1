import { queryOptions, useQuery } from '@tanstack/react-query';
import {
  addPhotograph,
  listBoxPhotographs,
  listPhotographs,
  removePhotograph,
  type Photograph,
} from '#shared/contracts/photographs.ts';
import { PHOTOGRAPH_LIMITS } from '#shared/domain/photograph.ts';
import { call, pathOf, readProblem } from './api.ts';
import { load } from './loaded.ts';
import { STALE } from './query-client.ts';
import { useFarmMutation } from './use-farm-mutation.ts';

/** Longest side of what is sent, in pixels: sharp on the widest column, light on a phone. */
const LONGEST = 1_600;

/** For the box's page. Without photographs, or without an answer, the drawings stand alone. */
export async function loadPhotographs(slug: string): Promise<Photograph[]> {
  const loaded = await load(listPhotographs, { params: { slug } });
  return loaded.state === 'ready' ? loaded.data.photographs : [];
}

function boxPhotographsQuery(boxKindId: string) {
  return queryOptions({
    queryKey: ['photographs', boxKindId],
    queryFn: ({ signal }) => call(listBoxPhotographs, { params: { boxKindId }, signal }),
    staleTime: STALE.office,
  });
}

export function useBoxPhotographs(boxKindId: string) {
  return useQuery(boxPhotographsQuery(boxKindId));
}

export function useRemovePhotograph() {
  return useFarmMutation((photographId: string) => call(removePhotograph, { params: { photographId } }));
}

/** Drawn anew at a size for pages before it is sent: upright, and without the place and the camera that the file names. */
export function useAddPhotograph(boxKindId: string) {
  return useFarmMutation(async ({ file, alt }: { file: Blob; alt: string }) => {
    const picture = await redraw(file);
    const path = pathOf(addPhotograph, { params: { boxKindId } });
    const response = await fetch(`${path}?${new URLSearchParams({ alt })}`, {
      method: addPhotograph.method,
      credentials: 'same-origin',
      headers: { 'Content-Type': picture.type },
      body: picture,
    });
    if (!response.ok) throw await readProblem(response);
  });
}

async function redraw(file: Blob): Promise<Blob> {
  const bitmap = await createImageBitmap(file).catch(() => {
    throw new Error('This file is no picture that can be read here. Take a JPEG, PNG or WebP.');
  });
  const scale = Math.min(1, LONGEST / Math.max(bitmap.width, bitmap.height));
  const canvas = document.createElement('canvas');
  canvas.width = Math.max(1, Math.round(bitmap.width * scale));
  canvas.height = Math.max(1, Math.round(bitmap.height * scale));
  canvas.getContext('2d')?.drawImage(bitmap, 0, 0, canvas.width, canvas.height);
  const picture = await new Promise<Blob | null>((resolve) => canvas.toBlob(resolve, 'image/jpeg', 0.85));
  if (!picture || picture.size > PHOTOGRAPH_LIMITS.bytes) throw new Error('This picture cannot be made small enough.');
  return picture;
}
