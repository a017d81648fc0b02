import { fireEvent, render, screen, waitFor } from '@testing-library/vue';
import { createPinia } from 'pinia';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import type { Upload } from '#shared/schemas/uploads.ts';
import UploadList from 'src/components/uploads/UploadList.vue';

const upload: Upload = {
  id: '8c9c3f0e-6c0e-4b7f-9a43-1f3a7f0f8d11',
  ownerType: 'bag',
  ownerId: '8c9c3f0e-6c0e-4b7f-9a43-1f3a7f0f8d12',
  purpose: 'photo',
  fileName: 'bag.jpg',
  contentType: 'image/jpeg',
  bytes: 2048,
  addedBy: 'Ola',
  addedAt: '2026-01-01T00:00:00.000Z',
};

type Answer = { status: number; body: unknown };
let answers: Record<string, Answer>;
const calls: { method: string; url: string; form: FormData | null }[] = [];

beforeEach(() => {
  calls.length = 0;
  answers = { GET: { status: 200, body: { uploads: [upload], may: { add: true } } } };
  vi.stubGlobal('fetch', (url: string, init: RequestInit) => {
    const method = init.method ?? 'GET';
    calls.push({ method, url, form: init.body instanceof FormData ? init.body : null });
    const { status, body } = answers[method] ?? { status: 500, body: {} };
    return Promise.resolve(new Response(JSON.stringify(body), { status }));
  });
});

const show = () =>
  render(UploadList, {
    props: {
      club: 'quillmere',
      ownerType: 'bag',
      ownerId: upload.ownerId,
      purposes: ['photo', 'certificate'],
    },
    global: { plugins: [createPinia()] },
  });

const drop = async (file: File) => {
  const input = screen.getByLabelText(/Add a file/);
  Object.defineProperty(input, 'files', { value: [file], configurable: true });
  await fireEvent.change(input);
};

describe('UploadList', () => {
  it('lists what is there, with where to get it', async () => {
    show();
    await screen.findByText('bag.jpg');
    const link = screen.getByRole('link', { name: 'Download bag.jpg' });
    expect(link.getAttribute('href')).toBe(
      `/api/v1/clubs/quillmere/uploads/${upload.id}/file?download=1`,
    );
  });

  it('sends a file with its owner and purpose, and lists it', async () => {
    show();
    await screen.findByText('bag.jpg');
    answers.POST = { status: 201, body: { ...upload, id: 'x', fileName: 'second.jpg' } };
    await drop(new File(['x'], 'second.jpg', { type: 'image/jpeg' }));
    await screen.findByText('second.jpg');
    const { form } = calls.find(({ method }) => method === 'POST') ?? {};
    expect([form?.get('ownerType'), form?.get('ownerId'), form?.get('purpose')]).toEqual([
      'bag',
      upload.ownerId,
      'photo',
    ]);
  });

  it('says why a file was refused, and by which name', async () => {
    show();
    await screen.findByText('bag.jpg');
    answers.POST = {
      status: 415,
      body: {
        status: 415,
        code: 'wrong_type',
        title: 'Wrong type of file',
        detail: 'x',
        errors: { file: 'Choose a JPEG.' },
      },
    };
    await drop(new File(['x'], 'second.jpg', { type: 'image/jpeg' }));
    await screen.findByText('second.jpg: Choose a JPEG.');
  });

  it('removes at once, and shows nothing to change to who may only look', async () => {
    const { unmount } = show();
    answers.DELETE = { status: 200, body: upload };
    await fireEvent.click(await screen.findByRole('button', { name: 'Remove bag.jpg' }));
    await waitFor(() => expect(screen.queryByText('bag.jpg')).toBeNull());
    unmount();
    answers.GET = { status: 200, body: { uploads: [], may: { add: false } } };
    show();
    await screen.findByText('No file yet.');
    expect(screen.queryByLabelText(/Add a file/)).toBeNull();
  });
});
