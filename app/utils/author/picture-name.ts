/** The plain name of a picture from the name its file has: "IMG 2041 (1).JPG" is img-2041-1.jpg. The last of a path counts. */
export function pictureName(fileName: string): string {
  const [last = ''] = fileName.split(/[\\/]/).slice(-1)
  const plain = last.normalize('NFKD').replace(/\p{M}/gu, '').toLowerCase()
  const dot = plain.lastIndexOf('.')
  const part = (text: string) => text.replace(/[^a-z0-9]+/g, '-').replace(/^-+|-+$/g, '')
  const stem = part(dot > 0 ? plain.slice(0, dot) : plain).slice(0, 60) || 'picture'
  const end = dot > 0 ? part(plain.slice(dot + 1)).slice(0, 8) : ''
  return end ? `${stem}.${end}` : stem
}
