/** The demo shop's logo, drawn for it: a bay's arc over three pipe ends. */
export const DEMO_LOGO = `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 240 80" width="240" height="80">
<path d="M10 58 C 40 10, 80 10, 110 58" fill="none" stroke="#16324f" stroke-width="7"/>
<circle cx="30" cy="62" r="9" fill="none" stroke="#16324f" stroke-width="5"/>
<circle cx="60" cy="62" r="9" fill="none" stroke="#16324f" stroke-width="5"/>
<circle cx="90" cy="62" r="9" fill="none" stroke="#16324f" stroke-width="5"/>
<path d="M130 22 h100 M130 40 h80 M130 58 h60" stroke="#16324f" stroke-width="7" fill="none"/>
</svg>
`;
