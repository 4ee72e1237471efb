const URLS = /(https?:\/\/[^\s<>"]+)/;

/** A mail's text with its line breaks. Links into the app can be followed; others are text, for nobody wrote them but us. */
export function MailText({ text, appUrl }: { readonly text: string; readonly appUrl: string }) {
  const pieces = text.trim().split(URLS);
  return (
    <div className="measure pt-4 font-book break-words whitespace-pre-wrap">
      {pieces.map((piece, place) =>
        piece.startsWith(`${appUrl}/`) ? (
          // The pieces of one mail never change places.
          <a key={place} href={piece} className="link">{piece}</a>
        ) : (
          piece
        ),
      )}
    </div>
  );
}
