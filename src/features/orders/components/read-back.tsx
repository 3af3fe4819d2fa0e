/** The order in one plain sentence, units in full. */
export function ReadBack({ text }: { text: string }) {
  return <p className="border-l-[3px] border-tide pl-s3 text-under font-semibold">{text}</p>;
}
