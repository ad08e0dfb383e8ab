import type { Attachment } from '#shared/schemas/attachment.ts'

/** A photo of a test as GET …/attachments answers it. */
export function buildAttachment(overrides: Partial<Attachment> = {}): Attachment {
  return {
    id: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1e01',
    subject: 'test',
    subjectId: '6d5c1c1e-2f57-4a53-9b1e-2a9a0b7c1d20',
    kind: 'photo',
    fileName: 'IMG_1.jpg',
    contentType: 'image/jpeg',
    bytes: 340_000,
    sha256: 'ab12cd34ef56'.padEnd(64, '0'),
    width: 2560,
    height: 1920,
    caption: 'Hole before filling',
    addedBy: { id: '4f6a2b1e-3f0a-4c55-9a53-0d1f3b7c9e21', name: 'Milan Petrak' },
    addedAt: '2026-12-01T20:00:00.000Z',
    takenAt: '2026-12-01T19:40:00.000Z',
    takenFrom: 'camera',
    withdrawn: null,
    ...overrides,
  }
}
