export { drawnEntry, drawnState, tyreOf, type DrawnTyre } from '$lib/drawing/corner';
