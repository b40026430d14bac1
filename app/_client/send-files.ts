import { errorShape } from '@/lib/api/error';

export interface Sent {
  readonly batch: { readonly id: number };
  readonly revision: string;
}

/** Of all files together, as the server takes them. */
const limit = 25 * 1024 * 1024;

/**
 * Sends files as a form, telling how far it is (fetch cannot).
 *
 * @throws {Error} with a sentence for the person
 */
export function sendFiles(
  address: string,
  files: readonly File[],
  fields: Readonly<Record<string, string>>,
  onProgress: (share: number) => void,
): Promise<Sent> {
  const size = files.reduce((sum, file) => sum + file.size, 0);
  if (size > limit) {
    return Promise.reject(new Error('The files are larger than 25 MB. Divide them and bring each part as a batch.'));
  }
  const form = new FormData();
  for (const [name, value] of Object.entries(fields)) form.append(name, value);
  for (const file of files) form.append('files', file, file.name);
  return new Promise((resolve, reject) => {
    const sending = new XMLHttpRequest();
    sending.open('POST', address);
    sending.upload.onprogress = ({ loaded, total }) => onProgress(total > 0 ? loaded / total : 0);
    sending.onerror = () => reject(new Error('The files did not arrive. Check the connection and send them again.'));
    sending.onload = () => {
      const answer = parsed(sending.responseText);
      if (sending.status === 201) return resolve(answer as Sent);
      const read = errorShape.safeParse(answer);
      reject(new Error(read.success ? read.data.error.message : `The server answered ${sending.status}. Send the files again.`));
    };
    sending.send(form);
  });
}

function parsed(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return null;
  }
}
