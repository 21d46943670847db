/**
 * `content-disposition` of a download (RFC 6266): the title as it is for readers of `filename*`, and a plain ASCII
 * name for the others. Nothing in a title can leave the header or name a folder.
 */
export function downloadAs(title: string, extension: string): string {
  const cleaned = title
    .normalize('NFC')
    .replace(/[\p{Cc}\p{Cf}\p{Cs}/\\:*?"<>|]+/gu, ' ')
    .replace(/\s+/g, ' ')
  const name =
    [...cleaned]
      .slice(0, 120)
      .join('')
      .replace(/^[ .]+|[ .]+$/g, '') || 'workbook'
  const plain =
    name
      .normalize('NFKD')
      .replace(/[^\x20-\x7e]/g, '')
      .replace(/[%;']/g, '')
      .replace(/\s+/g, ' ')
      .trim() || 'workbook'
  const encoded = encodeURIComponent(`${name}.${extension}`).replace(
    /['()*]/g,
    (sign) => `%${sign.charCodeAt(0).toString(16).toUpperCase()}`,
  )
  return `attachment; filename="${plain}.${extension}"; filename*=UTF-8''${encoded}`
}
