/** The characters whose widths are known, in the order of the rows below. */
const known =
  ' !"#$%&\'()*+,-./0123456789:;<=>?@ABCDEFGHIJKLMNOPQRSTUVWXYZ[\\]^_`abcdefghijklmnopqrstuvwxyz{|}~' +
  '–−×±°²·→↔≥≤€£½’“”µßäöüéèêàçñØøåæ…'

/** Advance widths of Work Sans, thousandths of the size, from the tables of the font files that are shipped. */
const rows = {
  400: '341 272 403 639 622 856 623 234 350 350 572 604 266 510 266 437 622 390 583 583 611 582 608 561 616 617 296 296 604 604 604 542 958 660 653 686 721 638 610 724 734 296 566 656 598 854 734 748 610 748 665 641 604 708 648 961 601 572 630 348 437 348 560 539 500 566 627 560 627 577 393 532 619 266 266 567 306 953 619 600 627 627 408 527 419 617 520 836 533 516 534 351 243 351 540 664 604 604 604 460 365 226 750 1062 604 604 700 620 855 255 443 443 622 617 566 600 617 577 577 577 566 560 619 748 600 566 895 870',
  500: '325 281 416 654 628 880 630 239 362 362 577 604 273 515 273 446 628 402 587 586 622 582 611 575 619 617 298 298 604 604 604 562 950 665 662 684 720 636 611 724 736 303 582 667 599 871 736 745 627 745 672 642 619 709 659 972 620 597 631 361 446 361 576 539 500 570 627 562 627 578 400 540 619 274 274 583 312 949 619 600 627 627 414 529 424 618 532 855 550 530 529 372 266 372 557 672 604 604 604 471 373 240 750 1073 604 604 701 620 881 267 472 472 622 626 570 600 618 578 578 578 570 562 619 745 600 570 891 887',
  600: '306 291 431 670 634 908 638 244 376 376 582 604 281 521 281 456 636 416 591 589 633 582 613 591 623 617 300 300 604 604 604 583 941 671 672 683 719 633 612 723 739 310 599 679 601 890 739 741 646 741 680 644 635 710 670 984 640 626 633 375 456 375 593 539 500 574 627 564 627 579 407 549 619 282 282 602 319 945 619 599 627 627 422 531 430 618 546 876 569 546 523 395 292 395 576 681 604 604 604 482 382 256 750 1085 604 604 701 621 909 280 504 504 622 636 574 599 618 578 578 578 574 564 619 741 599 574 887 906',
} as const

/** Weights of the family that are shipped. */
export type FontWeight = keyof typeof rows

const tableOf = (weight: FontWeight): ReadonlyMap<string, number> => {
  const widths = rows[weight].split(' ').map(Number)
  return new Map([...known].map((letter, i) => [letter, (widths[i] ?? 600) / 1000]))
}
const tables = { 400: tableOf(400), 500: tableOf(500), 600: tableOf(600) }

/** Width of a text on one line, in the unit of `size`; a letter that is not known counts as wide. */
export function textWidth(text: string, size: number, weight: FontWeight = 400): number {
  let width = 0
  for (const letter of text) width += tables[weight].get(letter) ?? 0.75
  return width * size
}

/** The text in lines no wider than `width`, broken at spaces; a longer word stands alone on its line. */
export function wrapText(text: string, width: number, size: number, weight: FontWeight = 400): string[] {
  const lines: string[] = []
  for (const word of text.split(/\s+/).filter(Boolean)) {
    const last = lines.at(-1)
    if (last !== undefined && textWidth(`${last} ${word}`, size, weight) <= width)
      lines[lines.length - 1] = `${last} ${word}`
    else lines.push(word)
  }
  return lines
}

/** The text, shortened to fit in `width` with an ellipsis. */
export function clippedText(text: string, width: number, size: number, weight: FontWeight = 400): string {
  if (textWidth(text, size, weight) <= width) return text
  let kept = text
  while (kept.length > 1 && textWidth(`${kept}…`, size, weight) > width) kept = kept.slice(0, -1)
  return `${kept.trimEnd()}…`
}
