/** A picture drawn as SVG by a function of `shared/drawing`, which escapes all text that comes from tables. */
export const Drawing = ({ svg, className }: { svg: string; className?: string }) => (
  <div className={className} dangerouslySetInnerHTML={{ __html: svg }} />
);
