export function HalfSection() { return <p>soon</p>; }
