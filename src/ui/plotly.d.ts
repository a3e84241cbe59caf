/** The part of Plotly that this client calls; the distribution brings no types. */
declare module 'plotly.js-dist-min' {
  interface Figure {
    data: unknown[];
    layout: unknown;
  }
  const Plotly: {
    downloadImage(
      figure: Figure,
      options: { format: 'png' | 'svg'; filename: string; width: number; height: number; scale?: number },
    ): Promise<string>;
  };
  export default Plotly;
}
