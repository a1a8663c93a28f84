/** [1] median time of many internal impedances over that of as many exponentials */
export function ratioToExponentials(
  impedances: (
    wire: { radius: number; conductivity: number; relativePermeability: number },
    omega: Float64Array,
    re: Float64Array,
    im: Float64Array,
  ) => void,
  points?: number,
  rounds?: number,
): number;
