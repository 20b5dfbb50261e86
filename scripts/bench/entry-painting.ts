// What a thread needs to paint and no more; bundled to be weighed.
export { chosenEngine } from '../../app/workers/chosen-engine'
export { pictureBench } from '#shared/picture/picture-bench'
